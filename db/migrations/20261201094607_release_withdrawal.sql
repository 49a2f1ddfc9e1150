ALTER TABLE "releases" ADD COLUMN "decisions" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "releases" ADD COLUMN "withdrawn_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "releases" ADD COLUMN "withdrawn_reason" text;--> statement-breakpoint
ALTER TABLE "releases" ADD CONSTRAINT "releases_withdrawn_reason" CHECK (("releases"."state" = 'withdrawn') = ("releases"."withdrawn_reason" is not null and "releases"."withdrawn_at" is not null));