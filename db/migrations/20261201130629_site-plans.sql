CREATE TABLE "site_plans" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"site_id" uuid NOT NULL,
	"name" text NOT NULL,
	"original_key" text NOT NULL,
	"sha256" text NOT NULL,
	"picture_key" text NOT NULL,
	"width_px" integer NOT NULL,
	"height_px" integer NOT NULL,
	"points" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"created_by_id" uuid NOT NULL,
	"removed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "site_plans_points" CHECK (jsonb_array_length("site_plans"."points") <> 1),
	CONSTRAINT "site_plans_sha256_hex" CHECK ("site_plans"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
ALTER TABLE "site_plans" ADD CONSTRAINT "site_plans_site_id_sites_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."sites"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site_plans" ADD CONSTRAINT "site_plans_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "site_plans_site_id_idx" ON "site_plans" USING btree ("site_id");--> statement-breakpoint
CREATE INDEX "site_plans_created_by_id_idx" ON "site_plans" USING btree ("created_by_id");