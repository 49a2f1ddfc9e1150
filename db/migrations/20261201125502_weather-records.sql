CREATE TABLE "weather_records" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"kind" text NOT NULL,
	"nature" text NOT NULL,
	"source_name" text NOT NULL,
	"station" text DEFAULT '' NOT NULL,
	"station_distance_km" double precision,
	"station_bearing_deg" double precision,
	"interval_min" integer NOT NULL,
	"licence_note" text DEFAULT '' NOT NULL,
	"file_sha256" text,
	"mapping" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"values" jsonb NOT NULL,
	"values_sha256" text NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"set_aside_at" timestamp with time zone,
	"set_aside_by_id" uuid,
	"set_aside_reason" text,
	CONSTRAINT "weather_records_interval_positive" CHECK ("weather_records"."interval_min" > 0),
	CONSTRAINT "weather_records_set_aside_reason" CHECK (("weather_records"."set_aside_at" is null) = ("weather_records"."set_aside_reason" is null))
);
--> statement-breakpoint
ALTER TABLE "weather_records" ADD CONSTRAINT "weather_records_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weather_records" ADD CONSTRAINT "weather_records_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weather_records" ADD CONSTRAINT "weather_records_set_aside_by_id_users_id_fk" FOREIGN KEY ("set_aside_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "weather_records_case_number_key" ON "weather_records" USING btree ("case_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "weather_records_same_values_key" ON "weather_records" USING btree ("case_id","source_name","values_sha256") WHERE "weather_records"."set_aside_at" is null;--> statement-breakpoint
CREATE INDEX "weather_records_created_by_id_idx" ON "weather_records" USING btree ("created_by_id");--> statement-breakpoint
CREATE INDEX "weather_records_set_aside_by_id_idx" ON "weather_records" USING btree ("set_aside_by_id");