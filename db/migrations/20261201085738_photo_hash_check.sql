ALTER TABLE "photos" ADD COLUMN "hash_checked_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "photos" ADD COLUMN "hash_check" text;