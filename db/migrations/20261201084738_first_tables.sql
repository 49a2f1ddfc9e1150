CREATE SEQUENCE "public"."case_numbers" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1;--> statement-breakpoint
CREATE TABLE "grants" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"role" text NOT NULL,
	"site_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "mailed_tokens" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"user_id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "organisations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"kind" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "organisations_name_unique" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "rate_limits" (
	"key" text PRIMARY KEY NOT NULL,
	"window_started_at" timestamp with time zone NOT NULL,
	"hits" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id" text PRIMARY KEY NOT NULL,
	"user_id" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"organisation_id" uuid NOT NULL,
	"email" text NOT NULL,
	"display_name" text NOT NULL,
	"password_hash" text,
	"units" text DEFAULT 'metric' NOT NULL,
	"disabled" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "users_email_folded" CHECK ("users"."email" = lower("users"."email"))
);
--> statement-breakpoint
CREATE TABLE "sites" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"organisation_id" uuid NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"address" text DEFAULT '' NOT NULL,
	"latitude_deg" double precision NOT NULL,
	"longitude_deg" double precision NOT NULL,
	"elevation_m" double precision DEFAULT 0 NOT NULL,
	"zone" text NOT NULL,
	"use" text DEFAULT 'other' NOT NULL,
	"jurisdiction" text DEFAULT 'other' NOT NULL,
	"skyline" jsonb,
	"guest_code" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sites_latitude_range" CHECK ("sites"."latitude_deg" between -90 and 90),
	CONSTRAINT "sites_longitude_range" CHECK ("sites"."longitude_deg" between -180 and 180)
);
--> statement-breakpoint
CREATE TABLE "case_notes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"author_id" uuid,
	"author_name" text NOT NULL,
	"body" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "cases" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"number" integer DEFAULT nextval('case_numbers') NOT NULL,
	"client_id" uuid NOT NULL,
	"receipt" text NOT NULL,
	"organisation_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"state" text DEFAULT 'reported' NOT NULL,
	"title" text NOT NULL,
	"narrative" text DEFAULT '' NOT NULL,
	"place_detail" text DEFAULT '' NOT NULL,
	"latitude_deg" double precision,
	"longitude_deg" double precision,
	"accuracy_m" double precision,
	"zone" text NOT NULL,
	"sighting" text NOT NULL,
	"event_type" text,
	"anyone_hurt" text NOT NULL,
	"hazard_still_present" text DEFAULT 'dont-know' NOT NULL,
	"found_at" timestamp with time zone,
	"found_precision" text DEFAULT 'exact' NOT NULL,
	"found_by_means" text,
	"found_clock_error_s" integer DEFAULT 0 NOT NULL,
	"onset_earliest_at" timestamp with time zone,
	"onset_latest_at" timestamp with time zone,
	"onset_basis" text,
	"extent" text,
	"weather_seen" text,
	"interim_control" text,
	"interim_control_at" timestamp with time zone,
	"interim_control_ends" text,
	"fire_service_attended" boolean,
	"loss_estimate" bigint,
	"loss_currency" text,
	"potential_consequence" text,
	"likelihood" text,
	"risk_basis" text,
	"risk" text,
	"privileged_note" text,
	"legal_hold" boolean DEFAULT false NOT NULL,
	"legal_hold_reason" text,
	"reporter_id" uuid,
	"guest_report" boolean DEFAULT false NOT NULL,
	"assigned_to_id" uuid,
	"duplicate_of_id" uuid,
	"reopen_count" integer DEFAULT 0 NOT NULL,
	"close_reason" text,
	"question" text,
	"answer" text,
	"answer_due_at" timestamp with time zone,
	"reconstruction_waiver" text,
	"evidence_waiver" text,
	"effectiveness_waiver" text,
	"lesson" text,
	"external_reports" text,
	"version" integer DEFAULT 1 NOT NULL,
	"reported_at" timestamp with time zone DEFAULT now() NOT NULL,
	"closed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "cases_number_unique" UNIQUE("number"),
	CONSTRAINT "cases_clientId_unique" UNIQUE("client_id"),
	CONSTRAINT "cases_receipt_unique" UNIQUE("receipt"),
	CONSTRAINT "cases_onset_order" CHECK ("cases"."onset_earliest_at" is null or "cases"."onset_latest_at" is null or "cases"."onset_earliest_at" <= "cases"."onset_latest_at"),
	CONSTRAINT "cases_duplicate_points" CHECK (("cases"."state" = 'duplicate') = ("cases"."duplicate_of_id" is not null)),
	CONSTRAINT "cases_not_own_duplicate" CHECK ("cases"."duplicate_of_id" is null or "cases"."duplicate_of_id" <> "cases"."id"),
	CONSTRAINT "cases_closed_at" CHECK (("cases"."state" = 'closed') = ("cases"."closed_at" is not null)),
	CONSTRAINT "cases_investigation_needs" CHECK ("cases"."state" not in ('investigation', 'findings') or ("cases"."event_type" is not null and "cases"."assigned_to_id" is not null and "cases"."risk" is not null)),
	CONSTRAINT "cases_hold_reason" CHECK (not "cases"."legal_hold" or "cases"."legal_hold_reason" is not null)
);
--> statement-breakpoint
CREATE TABLE "scenes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"scene" jsonb NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"author_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "injuries" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"involvement_id" uuid,
	"part" text,
	"kind" text,
	"treatment" text DEFAULT 'unknown' NOT NULL,
	"days_away" integer,
	"restricted_days" integer,
	"description" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "involvements" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"role" text NOT NULL,
	"name" text,
	"phone" text,
	"email" text,
	"relation" text,
	"age_band" text DEFAULT 'unknown' NOT NULL,
	"guardian_contact" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "photos" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"report_client_id" uuid NOT NULL,
	"case_id" uuid,
	"label" integer,
	"file_name" text NOT NULL,
	"mime" text NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"width_px" integer NOT NULL,
	"height_px" integer NOT NULL,
	"original_key" text NOT NULL,
	"view_key" text,
	"thumbnail_key" text,
	"state" text DEFAULT 'stored' NOT NULL,
	"exif" jsonb NOT NULL,
	"exif_answer" jsonb NOT NULL,
	"view" text,
	"caption" text DEFAULT '' NOT NULL,
	"alt_text" text DEFAULT '' NOT NULL,
	"taken_at" timestamp with time zone,
	"clock_error_s" integer DEFAULT 0 NOT NULL,
	"masks" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"releasable" text DEFAULT 'undecided' NOT NULL,
	"uploaded_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "photos_label_with_case" CHECK (("photos"."case_id" is null) = ("photos"."label" is null)),
	CONSTRAINT "photos_sha256_hex" CHECK ("photos"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "reconstructions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"scene_version" integer,
	"input" jsonb NOT NULL,
	"input_hash" text NOT NULL,
	"engine_version" text NOT NULL,
	"zone_rules" text DEFAULT '' NOT NULL,
	"result" jsonb,
	"result_hash" text,
	"progress_done" integer DEFAULT 0 NOT NULL,
	"progress_total" integer DEFAULT 0 NOT NULL,
	"failure" text,
	"note" text DEFAULT '' NOT NULL,
	"requested_by_id" uuid,
	"attached_by_id" uuid,
	"attached_at" timestamp with time zone,
	"superseded_at" timestamp with time zone,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reconstructions_done_has_result" CHECK ("reconstructions"."state" <> 'done' or ("reconstructions"."result" is not null and "reconstructions"."result_hash" is not null))
);
--> statement-breakpoint
CREATE TABLE "sun_returns" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"reconstruction_id" uuid NOT NULL,
	"on_day" text NOT NULL,
	"best_at" timestamp with time zone NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"to_at" timestamp with time zone NOT NULL,
	"minutes" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "findings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"state" text DEFAULT 'draft' NOT NULL,
	"opinion" text DEFAULT '' NOT NULL,
	"selected_hypothesis_id" uuid,
	"certainty" text DEFAULT 'undetermined' NOT NULL,
	"classification" text DEFAULT 'not-classified' NOT NULL,
	"immediate_causes" text DEFAULT '' NOT NULL,
	"underlying_causes" text DEFAULT '' NOT NULL,
	"root_causes" text DEFAULT '' NOT NULL,
	"limits" text DEFAULT '' NOT NULL,
	"author_id" uuid NOT NULL,
	"sent_at" timestamp with time zone,
	"reviewer_id" uuid,
	"reviewed_at" timestamp with time zone,
	"signed_at" timestamp with time zone,
	"frozen" jsonb,
	"frozen_hash" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "findings_reviewer_not_author" CHECK ("findings"."reviewer_id" is null or "findings"."reviewer_id" <> "findings"."author_id"),
	CONSTRAINT "findings_signed_frozen" CHECK ("findings"."state" <> 'signed' or ("findings"."signed_at" is not null and "findings"."frozen_hash" is not null))
);
--> statement-breakpoint
CREATE TABLE "hypotheses" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"statement" text NOT NULL,
	"predicts" text DEFAULT '' NOT NULL,
	"evidence_for" text DEFAULT '' NOT NULL,
	"evidence_against" text DEFAULT '' NOT NULL,
	"tests" jsonb NOT NULL,
	"result" text DEFAULT 'not-tested' NOT NULL,
	"tested_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "review_comments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"finding_id" uuid NOT NULL,
	"field" text NOT NULL,
	"body" text NOT NULL,
	"author_id" uuid NOT NULL,
	"settled_at" timestamp with time zone,
	"settled_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "action_proofs" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"corrective_action_id" uuid NOT NULL,
	"file_name" text NOT NULL,
	"mime" text NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"object_key" text NOT NULL,
	"uploaded_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "corrective_actions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"title" text NOT NULL,
	"why" text DEFAULT '' NOT NULL,
	"control_level" text NOT NULL,
	"interim" boolean DEFAULT false NOT NULL,
	"owner_id" uuid NOT NULL,
	"verifier_id" uuid NOT NULL,
	"due_on" date NOT NULL,
	"risk" text DEFAULT 'medium' NOT NULL,
	"cost" bigint,
	"cost_currency" text,
	"state" text DEFAULT 'open' NOT NULL,
	"proof" text DEFAULT '' NOT NULL,
	"done_at" timestamp with time zone,
	"verified_at" timestamp with time zone,
	"verified_by_id" uuid,
	"verification_note" text DEFAULT '' NOT NULL,
	"effect_check_on" date,
	"effect_note" text DEFAULT '' NOT NULL,
	"effect_at" timestamp with time zone,
	"effect_by_id" uuid,
	"withdrawn_reason" text,
	"version" integer DEFAULT 1 NOT NULL,
	"created_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "corrective_actions_verifier_not_owner" CHECK ("corrective_actions"."verifier_id" <> "corrective_actions"."owner_id"),
	CONSTRAINT "corrective_actions_verified_by_other" CHECK ("corrective_actions"."verified_by_id" is null or "corrective_actions"."verified_by_id" <> "corrective_actions"."owner_id"),
	CONSTRAINT "corrective_actions_done_has_proof" CHECK ("corrective_actions"."state" not in ('done', 'verified', 'effective', 'not-effective') or "corrective_actions"."done_at" is not null),
	CONSTRAINT "corrective_actions_withdrawn_reason" CHECK ("corrective_actions"."state" <> 'withdrawn' or "corrective_actions"."withdrawn_reason" is not null)
);
--> statement-breakpoint
CREATE TABLE "release_openings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"release_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "releases" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"case_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"audience" text DEFAULT 'insurer' NOT NULL,
	"recipient_organisation_id" uuid NOT NULL,
	"state" text DEFAULT 'prepared' NOT NULL,
	"change_note" text DEFAULT '' NOT NULL,
	"released" jsonb NOT NULL,
	"withheld" jsonb NOT NULL,
	"files" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"released_hash" text NOT NULL,
	"prepared_by_id" uuid NOT NULL,
	"approved_by_id" uuid,
	"approved_at" timestamp with time zone,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "releases_second_person" CHECK ("releases"."approved_by_id" is null or "releases"."approved_by_id" <> "releases"."prepared_by_id"),
	CONSTRAINT "releases_released_approved" CHECK ("releases"."state" <> 'released' or "releases"."approved_at" is not null)
);
--> statement-breakpoint
CREATE TABLE "log_entries" (
	"sequence" bigserial PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"organisation_id" uuid,
	"case_id" uuid,
	"actor_id" uuid,
	"actor_name" text NOT NULL,
	"event" text NOT NULL,
	"subject" text NOT NULL,
	"subject_id" text NOT NULL,
	"summary" text NOT NULL,
	"reason" text DEFAULT '' NOT NULL,
	"before" jsonb,
	"after" jsonb
);
--> statement-breakpoint
CREATE TABLE "outbox" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"dedupe_key" text NOT NULL,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"body_text" text NOT NULL,
	"body_html" text NOT NULL,
	"case_id" uuid,
	"state" text DEFAULT 'waiting' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"next_attempt_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_error" text,
	"sent_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "grants" ADD CONSTRAINT "grants_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "grants" ADD CONSTRAINT "grants_site_id_sites_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."sites"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mailed_tokens" ADD CONSTRAINT "mailed_tokens_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "users" ADD CONSTRAINT "users_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sites" ADD CONSTRAINT "sites_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "case_notes" ADD CONSTRAINT "case_notes_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "case_notes" ADD CONSTRAINT "case_notes_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_site_id_sites_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."sites"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_reporter_id_users_id_fk" FOREIGN KEY ("reporter_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_assigned_to_id_users_id_fk" FOREIGN KEY ("assigned_to_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_duplicate_of_id_cases_id_fk" FOREIGN KEY ("duplicate_of_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenes" ADD CONSTRAINT "scenes_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenes" ADD CONSTRAINT "scenes_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "injuries" ADD CONSTRAINT "injuries_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "injuries" ADD CONSTRAINT "injuries_involvement_id_involvements_id_fk" FOREIGN KEY ("involvement_id") REFERENCES "public"."involvements"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "involvements" ADD CONSTRAINT "involvements_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "photos" ADD CONSTRAINT "photos_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "photos" ADD CONSTRAINT "photos_uploaded_by_id_users_id_fk" FOREIGN KEY ("uploaded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reconstructions" ADD CONSTRAINT "reconstructions_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reconstructions" ADD CONSTRAINT "reconstructions_requested_by_id_users_id_fk" FOREIGN KEY ("requested_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reconstructions" ADD CONSTRAINT "reconstructions_attached_by_id_users_id_fk" FOREIGN KEY ("attached_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sun_returns" ADD CONSTRAINT "sun_returns_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sun_returns" ADD CONSTRAINT "sun_returns_reconstruction_id_reconstructions_id_fk" FOREIGN KEY ("reconstruction_id") REFERENCES "public"."reconstructions"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_selected_hypothesis_id_hypotheses_id_fk" FOREIGN KEY ("selected_hypothesis_id") REFERENCES "public"."hypotheses"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_reviewer_id_users_id_fk" FOREIGN KEY ("reviewer_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "hypotheses" ADD CONSTRAINT "hypotheses_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "hypotheses" ADD CONSTRAINT "hypotheses_tested_by_id_users_id_fk" FOREIGN KEY ("tested_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "review_comments" ADD CONSTRAINT "review_comments_finding_id_findings_id_fk" FOREIGN KEY ("finding_id") REFERENCES "public"."findings"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "review_comments" ADD CONSTRAINT "review_comments_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "review_comments" ADD CONSTRAINT "review_comments_settled_by_id_users_id_fk" FOREIGN KEY ("settled_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "action_proofs" ADD CONSTRAINT "action_proofs_corrective_action_id_corrective_actions_id_fk" FOREIGN KEY ("corrective_action_id") REFERENCES "public"."corrective_actions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "action_proofs" ADD CONSTRAINT "action_proofs_uploaded_by_id_users_id_fk" FOREIGN KEY ("uploaded_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_owner_id_users_id_fk" FOREIGN KEY ("owner_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_verifier_id_users_id_fk" FOREIGN KEY ("verifier_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_verified_by_id_users_id_fk" FOREIGN KEY ("verified_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_effect_by_id_users_id_fk" FOREIGN KEY ("effect_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "release_openings" ADD CONSTRAINT "release_openings_release_id_releases_id_fk" FOREIGN KEY ("release_id") REFERENCES "public"."releases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "release_openings" ADD CONSTRAINT "release_openings_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "releases" ADD CONSTRAINT "releases_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "releases" ADD CONSTRAINT "releases_recipient_organisation_id_organisations_id_fk" FOREIGN KEY ("recipient_organisation_id") REFERENCES "public"."organisations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "releases" ADD CONSTRAINT "releases_prepared_by_id_users_id_fk" FOREIGN KEY ("prepared_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "releases" ADD CONSTRAINT "releases_approved_by_id_users_id_fk" FOREIGN KEY ("approved_by_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "log_entries" ADD CONSTRAINT "log_entries_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "log_entries" ADD CONSTRAINT "log_entries_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "log_entries" ADD CONSTRAINT "log_entries_actor_id_users_id_fk" FOREIGN KEY ("actor_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox" ADD CONSTRAINT "outbox_case_id_cases_id_fk" FOREIGN KEY ("case_id") REFERENCES "public"."cases"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "grants_user_id_idx" ON "grants" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "grants_site_id_idx" ON "grants" USING btree ("site_id");--> statement-breakpoint
CREATE UNIQUE INDEX "grants_once" ON "grants" USING btree ("user_id","role",coalesce("site_id", '00000000-0000-0000-0000-000000000000'::uuid));--> statement-breakpoint
CREATE INDEX "mailed_tokens_user_id_idx" ON "mailed_tokens" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_user_id_idx" ON "sessions" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_key" ON "users" USING btree ("email");--> statement-breakpoint
CREATE INDEX "users_organisation_id_idx" ON "users" USING btree ("organisation_id");--> statement-breakpoint
CREATE UNIQUE INDEX "sites_code_key" ON "sites" USING btree ("organisation_id","code");--> statement-breakpoint
CREATE UNIQUE INDEX "sites_guest_code_key" ON "sites" USING btree ("guest_code");--> statement-breakpoint
CREATE INDEX "sites_organisation_id_idx" ON "sites" USING btree ("organisation_id");--> statement-breakpoint
CREATE INDEX "case_notes_case_id_idx" ON "case_notes" USING btree ("case_id");--> statement-breakpoint
CREATE INDEX "case_notes_author_id_idx" ON "case_notes" USING btree ("author_id");--> statement-breakpoint
CREATE INDEX "cases_organisation_id_state_idx" ON "cases" USING btree ("organisation_id","state");--> statement-breakpoint
CREATE INDEX "cases_site_id_idx" ON "cases" USING btree ("site_id");--> statement-breakpoint
CREATE INDEX "cases_reporter_id_idx" ON "cases" USING btree ("reporter_id");--> statement-breakpoint
CREATE INDEX "cases_assigned_to_id_idx" ON "cases" USING btree ("assigned_to_id");--> statement-breakpoint
CREATE INDEX "cases_duplicate_of_id_idx" ON "cases" USING btree ("duplicate_of_id");--> statement-breakpoint
CREATE UNIQUE INDEX "scenes_case_id_version_key" ON "scenes" USING btree ("case_id","version");--> statement-breakpoint
CREATE INDEX "scenes_author_id_idx" ON "scenes" USING btree ("author_id");--> statement-breakpoint
CREATE INDEX "injuries_case_id_idx" ON "injuries" USING btree ("case_id");--> statement-breakpoint
CREATE INDEX "injuries_involvement_id_idx" ON "injuries" USING btree ("involvement_id");--> statement-breakpoint
CREATE INDEX "involvements_case_id_idx" ON "involvements" USING btree ("case_id");--> statement-breakpoint
CREATE UNIQUE INDEX "photos_report_sha256_key" ON "photos" USING btree ("report_client_id","sha256");--> statement-breakpoint
CREATE UNIQUE INDEX "photos_case_label_key" ON "photos" USING btree ("case_id","label");--> statement-breakpoint
CREATE INDEX "photos_case_id_idx" ON "photos" USING btree ("case_id");--> statement-breakpoint
CREATE INDEX "photos_uploaded_by_id_idx" ON "photos" USING btree ("uploaded_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "reconstructions_case_number_key" ON "reconstructions" USING btree ("case_id","number");--> statement-breakpoint
CREATE INDEX "reconstructions_requested_by_id_idx" ON "reconstructions" USING btree ("requested_by_id");--> statement-breakpoint
CREATE INDEX "reconstructions_attached_by_id_idx" ON "reconstructions" USING btree ("attached_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "sun_returns_case_day_key" ON "sun_returns" USING btree ("case_id","on_day");--> statement-breakpoint
CREATE INDEX "sun_returns_best_at_idx" ON "sun_returns" USING btree ("best_at");--> statement-breakpoint
CREATE INDEX "sun_returns_reconstruction_id_idx" ON "sun_returns" USING btree ("reconstruction_id");--> statement-breakpoint
CREATE UNIQUE INDEX "findings_case_version_key" ON "findings" USING btree ("case_id","version");--> statement-breakpoint
CREATE INDEX "findings_author_id_idx" ON "findings" USING btree ("author_id");--> statement-breakpoint
CREATE INDEX "findings_reviewer_id_idx" ON "findings" USING btree ("reviewer_id");--> statement-breakpoint
CREATE INDEX "findings_selected_hypothesis_id_idx" ON "findings" USING btree ("selected_hypothesis_id");--> statement-breakpoint
CREATE INDEX "hypotheses_case_id_idx" ON "hypotheses" USING btree ("case_id");--> statement-breakpoint
CREATE INDEX "hypotheses_tested_by_id_idx" ON "hypotheses" USING btree ("tested_by_id");--> statement-breakpoint
CREATE INDEX "review_comments_finding_id_idx" ON "review_comments" USING btree ("finding_id");--> statement-breakpoint
CREATE INDEX "review_comments_author_id_idx" ON "review_comments" USING btree ("author_id");--> statement-breakpoint
CREATE INDEX "review_comments_settled_by_id_idx" ON "review_comments" USING btree ("settled_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "action_proofs_action_sha256_key" ON "action_proofs" USING btree ("corrective_action_id","sha256");--> statement-breakpoint
CREATE INDEX "action_proofs_uploaded_by_id_idx" ON "action_proofs" USING btree ("uploaded_by_id");--> statement-breakpoint
CREATE UNIQUE INDEX "corrective_actions_case_number_key" ON "corrective_actions" USING btree ("case_id","number");--> statement-breakpoint
CREATE INDEX "corrective_actions_owner_id_idx" ON "corrective_actions" USING btree ("owner_id");--> statement-breakpoint
CREATE INDEX "corrective_actions_verifier_id_idx" ON "corrective_actions" USING btree ("verifier_id");--> statement-breakpoint
CREATE INDEX "corrective_actions_verified_by_id_idx" ON "corrective_actions" USING btree ("verified_by_id");--> statement-breakpoint
CREATE INDEX "corrective_actions_effect_by_id_idx" ON "corrective_actions" USING btree ("effect_by_id");--> statement-breakpoint
CREATE INDEX "corrective_actions_created_by_id_idx" ON "corrective_actions" USING btree ("created_by_id");--> statement-breakpoint
CREATE INDEX "corrective_actions_due_on_idx" ON "corrective_actions" USING btree ("due_on");--> statement-breakpoint
CREATE INDEX "release_openings_release_id_idx" ON "release_openings" USING btree ("release_id");--> statement-breakpoint
CREATE INDEX "release_openings_user_id_idx" ON "release_openings" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "releases_case_number_key" ON "releases" USING btree ("case_id","number");--> statement-breakpoint
CREATE INDEX "releases_recipient_organisation_id_idx" ON "releases" USING btree ("recipient_organisation_id");--> statement-breakpoint
CREATE INDEX "releases_prepared_by_id_idx" ON "releases" USING btree ("prepared_by_id");--> statement-breakpoint
CREATE INDEX "releases_approved_by_id_idx" ON "releases" USING btree ("approved_by_id");--> statement-breakpoint
CREATE INDEX "log_entries_case_id_idx" ON "log_entries" USING btree ("case_id","sequence");--> statement-breakpoint
CREATE INDEX "log_entries_organisation_id_idx" ON "log_entries" USING btree ("organisation_id","sequence");--> statement-breakpoint
CREATE INDEX "log_entries_actor_id_idx" ON "log_entries" USING btree ("actor_id");--> statement-breakpoint
CREATE UNIQUE INDEX "outbox_dedupe_key" ON "outbox" USING btree ("dedupe_key");--> statement-breakpoint
CREATE INDEX "outbox_due_idx" ON "outbox" USING btree ("state","next_attempt_at");--> statement-breakpoint
CREATE INDEX "outbox_case_id_idx" ON "outbox" USING btree ("case_id");