CREATE TABLE "finding_reports" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"finding_id" uuid NOT NULL,
	"document" jsonb NOT NULL,
	"document_hash" text NOT NULL,
	"pdf_key" text,
	"pdf_sha256" text,
	"pdf_bytes" bigint,
	"pdf_made_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "finding_reports_findingId_unique" UNIQUE("finding_id"),
	CONSTRAINT "finding_reports_document_hash_hex" CHECK ("finding_reports"."document_hash" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "finding_reports_pdf_whole" CHECK (("finding_reports"."pdf_key" is null) = ("finding_reports"."pdf_sha256" is null) and ("finding_reports"."pdf_key" is null) = ("finding_reports"."pdf_bytes" is null))
);
--> statement-breakpoint
CREATE TABLE "attachments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"label" integer NOT NULL,
	"title" text NOT NULL,
	"kind" text NOT NULL,
	"class" text NOT NULL,
	"file_name" text NOT NULL,
	"mime" text NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"object_key" text NOT NULL,
	"hash_checked_at" timestamp with time zone,
	"hash_check" text,
	"uploaded_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "attachments_sha256_hex" CHECK ("attachments"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "custody_records" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"item_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"previous_sequence" integer,
	"holder_role" text NOT NULL,
	"holder_name" text NOT NULL,
	"place" text DEFAULT '' NOT NULL,
	"purpose" text NOT NULL,
	"condition" text NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"to_at" timestamp with time zone,
	"given_by" text DEFAULT '' NOT NULL,
	"received_by" text NOT NULL,
	"recorded_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "custody_records_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "custody_records_item_sequence_key" UNIQUE("item_id","sequence"),
	CONSTRAINT "custody_records_item_sequence_end_key" UNIQUE("item_id","sequence","to_at"),
	CONSTRAINT "custody_records_order" CHECK ("custody_records"."to_at" is null or "custody_records"."to_at" > "custody_records"."from_at"),
	CONSTRAINT "custody_records_chain" CHECK (case when "custody_records"."sequence" = 1 then "custody_records"."previous_sequence" is null else "custody_records"."previous_sequence" is not null and "custody_records"."previous_sequence" = "custody_records"."sequence" - 1 end),
	CONSTRAINT "custody_records_given" CHECK ("custody_records"."sequence" = 1 or "custody_records"."given_by" <> '')
);
--> statement-breakpoint
CREATE TABLE "evidence_exams" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"item_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"method" text NOT NULL,
	"result" text NOT NULL,
	"performed_by" text NOT NULL,
	"performed_at" timestamp with time zone NOT NULL,
	"notice_to" text DEFAULT '' NOT NULL,
	"notice_at" timestamp with time zone,
	"protocol_attachment_id" uuid,
	"recorded_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "evidence_exams_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "evidence_exams_may_alter_needs" CHECK ("evidence_exams"."kind" <> 'may-alter' or ("evidence_exams"."notice_to" <> '' and "evidence_exams"."notice_at" is not null and "evidence_exams"."notice_at" < "evidence_exams"."performed_at" and "evidence_exams"."protocol_attachment_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "evidence_items" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"label" integer NOT NULL,
	"kind" text NOT NULL,
	"description" text NOT NULL,
	"from_where" text NOT NULL,
	"collected_by" text NOT NULL,
	"collected_at" timestamp with time zone NOT NULL,
	"seal_number" text DEFAULT '' NOT NULL,
	"disposal" text DEFAULT 'undecided' NOT NULL,
	"disposal_reason" text DEFAULT '' NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "evidence_items_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "evidence_items_label" CHECK ("evidence_items"."label" > 0),
	CONSTRAINT "evidence_items_disposal_reason" CHECK ("evidence_items"."disposal" = 'undecided' or "evidence_items"."disposal_reason" <> '')
);
--> statement-breakpoint
CREATE TABLE "witness_accounts" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"label" integer NOT NULL,
	"involvement_id" uuid NOT NULL,
	"taken_by_id" uuid NOT NULL,
	"taken_at" timestamp with time zone NOT NULL,
	"language" text NOT NULL,
	"words" text NOT NULL,
	"read_back" boolean NOT NULL,
	"speaks_of_at" timestamp with time zone,
	"signed_attachment_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "witness_accounts_clientId_unique" UNIQUE("client_id")
);
--> statement-breakpoint
CREATE TABLE "timeline_events" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"client_id" uuid NOT NULL,
	"source" text NOT NULL,
	"source_name" text NOT NULL,
	"reading_at" timestamp with time zone NOT NULL,
	"clock_error_s" integer DEFAULT 0 NOT NULL,
	"clock_error_basis" text NOT NULL,
	"what" text NOT NULL,
	"attachment_id" uuid,
	"created_by_id" uuid NOT NULL,
	"withdrawn_at" timestamp with time zone,
	"withdrawn_reason" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "timeline_events_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "timeline_events_withdrawn" CHECK (("timeline_events"."withdrawn_at" is null) = ("timeline_events"."withdrawn_reason" is null))
);
--> statement-breakpoint
ALTER TABLE "photos" ADD COLUMN "position" integer;--> statement-breakpoint
ALTER TABLE "photos" ADD COLUMN "made_smaller" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "photos" ADD COLUMN "marks" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "finding_reports" ADD CONSTRAINT "finding_reports_finding_id_findings_id_fk" FOREIGN KEY ("finding_id") REFERENCES "public"."findings"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_uploaded_by_id_users_id_fk" FOREIGN KEY ("uploaded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "custody_records" ADD CONSTRAINT "custody_records_item_id_evidence_items_id_fk" FOREIGN KEY ("item_id") REFERENCES "public"."evidence_items"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "custody_records" ADD CONSTRAINT "custody_records_recorded_by_id_users_id_fk" FOREIGN KEY ("recorded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "custody_records" ADD CONSTRAINT "custody_records_no_gap" FOREIGN KEY ("item_id","previous_sequence","from_at") REFERENCES "public"."custody_records"("item_id","sequence","to_at") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_exams" ADD CONSTRAINT "evidence_exams_item_id_evidence_items_id_fk" FOREIGN KEY ("item_id") REFERENCES "public"."evidence_items"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_exams" ADD CONSTRAINT "evidence_exams_protocol_attachment_id_attachments_id_fk" FOREIGN KEY ("protocol_attachment_id") REFERENCES "public"."attachments"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_exams" ADD CONSTRAINT "evidence_exams_recorded_by_id_users_id_fk" FOREIGN KEY ("recorded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_items" ADD CONSTRAINT "evidence_items_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence_items" ADD CONSTRAINT "evidence_items_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "witness_accounts" ADD CONSTRAINT "witness_accounts_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "witness_accounts" ADD CONSTRAINT "witness_accounts_involvement_id_involvements_id_fk" FOREIGN KEY ("involvement_id") REFERENCES "public"."involvements"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "witness_accounts" ADD CONSTRAINT "witness_accounts_taken_by_id_users_id_fk" FOREIGN KEY ("taken_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "witness_accounts" ADD CONSTRAINT "witness_accounts_signed_attachment_id_attachments_id_fk" FOREIGN KEY ("signed_attachment_id") REFERENCES "public"."attachments"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "timeline_events" ADD CONSTRAINT "timeline_events_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "timeline_events" ADD CONSTRAINT "timeline_events_attachment_id_attachments_id_fk" FOREIGN KEY ("attachment_id") REFERENCES "public"."attachments"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "timeline_events" ADD CONSTRAINT "timeline_events_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "attachments_case_label_key" ON "attachments" USING btree ("case_id","label");--> statement-breakpoint
CREATE UNIQUE INDEX "attachments_case_sha256_key" ON "attachments" USING btree ("case_id","sha256");--> statement-breakpoint
CREATE INDEX "attachments_uploaded_by_id_idx" ON "attachments" USING btree ("uploaded_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "custody_records_one_open" ON "custody_records" USING btree ("item_id") WHERE "custody_records"."to_at" is null;--> statement-breakpoint
CREATE INDEX "custody_records_recorded_by_id_idx" ON "custody_records" USING btree ("recorded_by_id");--> statement-breakpoint
CREATE INDEX "evidence_exams_item_id_idx" ON "evidence_exams" USING btree ("item_id");--> statement-breakpoint
CREATE INDEX "evidence_exams_protocol_attachment_id_idx" ON "evidence_exams" USING btree ("protocol_attachment_id");--> statement-breakpoint
CREATE INDEX "evidence_exams_recorded_by_id_idx" ON "evidence_exams" USING btree ("recorded_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "evidence_items_case_label_key" ON "evidence_items" USING btree ("case_id","label");--> statement-breakpoint
CREATE INDEX "evidence_items_created_by_id_idx" ON "evidence_items" USING btree ("created_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "witness_accounts_case_label_key" ON "witness_accounts" USING btree ("case_id","label");--> statement-breakpoint
CREATE INDEX "witness_accounts_involvement_id_idx" ON "witness_accounts" USING btree ("involvement_id");--> statement-breakpoint
CREATE INDEX "witness_accounts_taken_by_id_idx" ON "witness_accounts" USING btree ("taken_by_id");--> statement-breakpoint
CREATE INDEX "witness_accounts_signed_attachment_id_idx" ON "witness_accounts" USING btree ("signed_attachment_id");--> statement-breakpoint
CREATE INDEX "timeline_events_case_id_idx" ON "timeline_events" USING btree ("case_id");--> statement-breakpoint
CREATE INDEX "timeline_events_attachment_id_idx" ON "timeline_events" USING btree ("attachment_id");--> statement-breakpoint
CREATE INDEX "timeline_events_created_by_id_idx" ON "timeline_events" USING btree ("created_by_id");