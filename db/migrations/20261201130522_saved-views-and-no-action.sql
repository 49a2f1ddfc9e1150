CREATE TABLE "saved_views" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"name" text NOT NULL,
	"search" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "saved_views_name_given" CHECK (btrim("saved_views"."name") <> ''),
	CONSTRAINT "saved_views_search_short" CHECK (length("saved_views"."search") <= 600)
);
--> statement-breakpoint
ALTER TABLE "cases" ADD COLUMN "no_action_reason" text;--> statement-breakpoint
ALTER TABLE "saved_views" ADD CONSTRAINT "saved_views_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "saved_views_user_id_name_key" ON "saved_views" USING btree ("user_id",lower("name"));