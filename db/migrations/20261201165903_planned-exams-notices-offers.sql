CREATE TABLE "custody_offers" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"item_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"receiver_id" uuid NOT NULL,
	"holder_role" text NOT NULL,
	"place" text DEFAULT '' NOT NULL,
	"purpose" text NOT NULL,
	"condition" text NOT NULL,
	"given_by" text NOT NULL,
	"offered_by_id" uuid NOT NULL,
	"answer" text,
	"answer_reason" text DEFAULT '' NOT NULL,
	"answered_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "custody_offers_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "custody_offers_answered" CHECK (("custody_offers"."answer" is null) = ("custody_offers"."answered_at" is null)),
	CONSTRAINT "custody_offers_declined_why" CHECK ("custody_offers"."answer" is distinct from 'declined' or "custody_offers"."answer_reason" <> ''),
	CONSTRAINT "custody_offers_holder" CHECK ("custody_offers"."holder_role" <> 'disposed')
);
--> statement-breakpoint
CREATE TABLE "planned_exams" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"item_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"method" text NOT NULL,
	"performed_by" text NOT NULL,
	"planned_at" timestamp with time zone NOT NULL,
	"waiting_days" integer NOT NULL,
	"tell_roles" text[] NOT NULL,
	"protocol_attachment_id" uuid,
	"revision" integer DEFAULT 1 NOT NULL,
	"outcome" text,
	"cancel_reason" text DEFAULT '' NOT NULL,
	"exam_id" uuid,
	"settled_at" timestamp with time zone,
	"settled_by_id" uuid,
	"planned_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "planned_exams_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "planned_exams_examId_unique" UNIQUE("exam_id"),
	CONSTRAINT "planned_exams_waiting" CHECK ("planned_exams"."waiting_days" between 0 and 365),
	CONSTRAINT "planned_exams_tells" CHECK (cardinality("planned_exams"."tell_roles") > 0),
	CONSTRAINT "planned_exams_settled" CHECK (("planned_exams"."outcome" is null) = ("planned_exams"."settled_at" is null) and ("planned_exams"."outcome" is null) = ("planned_exams"."settled_by_id" is null)),
	CONSTRAINT "planned_exams_made" CHECK (("planned_exams"."outcome" is not distinct from 'made') = ("planned_exams"."exam_id" is not null)),
	CONSTRAINT "planned_exams_cancelled_why" CHECK (("planned_exams"."outcome" is not distinct from 'cancelled') = ("planned_exams"."cancel_reason" <> ''))
);
--> statement-breakpoint
CREATE TABLE "evidence_notices" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"item_id" uuid NOT NULL,
	"plan_id" uuid,
	"client_id" uuid NOT NULL,
	"party_role" text NOT NULL,
	"to_whom" text NOT NULL,
	"way" text NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	"recorded_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "evidence_notices_clientId_unique" UNIQUE("client_id")
);
--> statement-breakpoint
CREATE TABLE "notice_replies" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"notice_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"answer" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"answered_at" timestamp with time zone NOT NULL,
	"recorded_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "notice_replies_clientId_unique" UNIQUE("client_id")
);
--> statement-breakpoint
ALTER TABLE "custody_records" ADD COLUMN "receiver_id" uuid;--> statement-breakpoint
ALTER TABLE "evidence_exams" ADD COLUMN "went_ahead_reason" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "custody_offers" ADD CONSTRAINT "custody_offers_item_id_evidence_items_id_fk" FOREIGN KEY ("item_id") REFERENCES "public"."evidence_items"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "custody_offers" ADD CONSTRAINT "custody_offers_receiver_id_users_id_fk" FOREIGN KEY ("receiver_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "custody_offers" ADD CONSTRAINT "custody_offers_offered_by_id_users_id_fk" FOREIGN KEY ("offered_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planned_exams" ADD CONSTRAINT "planned_exams_item_id_evidence_items_id_fk" FOREIGN KEY ("item_id") REFERENCES "public"."evidence_items"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planned_exams" ADD CONSTRAINT "planned_exams_protocol_attachment_id_attachments_id_fk" FOREIGN KEY ("protocol_attachment_id") REFERENCES "public"."attachments"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planned_exams" ADD CONSTRAINT "planned_exams_exam_id_evidence_exams_id_fk" FOREIGN KEY ("exam_id") REFERENCES "public"."evidence_exams"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planned_exams" ADD CONSTRAINT "planned_exams_settled_by_id_users_id_fk" FOREIGN KEY ("settled_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planned_exams" ADD CONSTRAINT "planned_exams_planned_by_id_users_id_fk" FOREIGN KEY ("planned_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_notices" ADD CONSTRAINT "evidence_notices_item_id_evidence_items_id_fk" FOREIGN KEY ("item_id") REFERENCES "public"."evidence_items"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_notices" ADD CONSTRAINT "evidence_notices_plan_id_planned_exams_id_fk" FOREIGN KEY ("plan_id") REFERENCES "public"."planned_exams"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_notices" ADD CONSTRAINT "evidence_notices_recorded_by_id_users_id_fk" FOREIGN KEY ("recorded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notice_replies" ADD CONSTRAINT "notice_replies_notice_id_evidence_notices_id_fk" FOREIGN KEY ("notice_id") REFERENCES "public"."evidence_notices"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notice_replies" ADD CONSTRAINT "notice_replies_recorded_by_id_users_id_fk" FOREIGN KEY ("recorded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "custody_offers_one_open" ON "custody_offers" USING btree ("item_id") WHERE "custody_offers"."answer" is null;--> statement-breakpoint
CREATE INDEX "custody_offers_item_id_idx" ON "custody_offers" USING btree ("item_id");--> statement-breakpoint
CREATE INDEX "custody_offers_receiver_id_idx" ON "custody_offers" USING btree ("receiver_id");--> statement-breakpoint
CREATE INDEX "custody_offers_offered_by_id_idx" ON "custody_offers" USING btree ("offered_by_id");--> statement-breakpoint
CREATE INDEX "planned_exams_item_id_idx" ON "planned_exams" USING btree ("item_id");--> statement-breakpoint
CREATE INDEX "planned_exams_protocol_attachment_id_idx" ON "planned_exams" USING btree ("protocol_attachment_id");--> statement-breakpoint
CREATE INDEX "planned_exams_settled_by_id_idx" ON "planned_exams" USING btree ("settled_by_id");--> statement-breakpoint
CREATE INDEX "planned_exams_planned_by_id_idx" ON "planned_exams" USING btree ("planned_by_id");--> statement-breakpoint
CREATE INDEX "evidence_notices_item_id_idx" ON "evidence_notices" USING btree ("item_id");--> statement-breakpoint
CREATE INDEX "evidence_notices_plan_id_idx" ON "evidence_notices" USING btree ("plan_id");--> statement-breakpoint
CREATE INDEX "evidence_notices_recorded_by_id_idx" ON "evidence_notices" USING btree ("recorded_by_id");--> statement-breakpoint
CREATE INDEX "notice_replies_notice_id_idx" ON "notice_replies" USING btree ("notice_id");--> statement-breakpoint
CREATE INDEX "notice_replies_recorded_by_id_idx" ON "notice_replies" USING btree ("recorded_by_id");--> statement-breakpoint
ALTER TABLE "custody_records" ADD CONSTRAINT "custody_records_receiver_id_users_id_fk" FOREIGN KEY ("receiver_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "custody_records_receiver_id_idx" ON "custody_records" USING btree ("receiver_id");