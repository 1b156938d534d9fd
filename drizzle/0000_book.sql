CREATE TYPE "public"."call_letters" AS ENUM('AD', 'DI', 'AX', 'WA', 'SC', 'AI', 'HY', 'VP', 'TM', 'ST');--> statement-breakpoint
CREATE TYPE "public"."entry_kind" AS ENUM('scheme', 'time-method', 'stencil');--> statement-breakpoint
CREATE TYPE "public"."equation" AS ENUM('advection', 'diffusion', 'advection-diffusion', 'wave', 'schrodinger', 'airy', 'hyperdiffusion', 'advection-2d', 'diffusion-2d', 'diffusion-3d', 'wave-2d', 'wave-3d');--> statement-breakpoint
CREATE TYPE "public"."letter_kind" AS ENUM('submitted', 'returned', 'vetted', 'remark', 'recall', 'invitation', 'password-reset');--> statement-breakpoint
CREATE TYPE "public"."letter_state" AS ENUM('waiting', 'sent', 'given-up');--> statement-breakpoint
CREATE TYPE "public"."person_role" AS ENUM('reader', 'contributor', 'maintainer', 'administrator');--> statement-breakpoint
CREATE TYPE "public"."analysis_verdict" AS ENUM('facts', 'inconsistent', 'invalid');--> statement-breakpoint
CREATE TYPE "public"."revision_state" AS ENUM('draft', 'in-review', 'returned', 'vetted', 'superseded', 'withdrawn');--> statement-breakpoint
CREATE TYPE "public"."finding_name" AS ENUM('clean-build', 'exact-step', 'amplification', 'refinement', 'margin', 'agreement', 'guards', 'pace');--> statement-breakpoint
CREATE TYPE "public"."finding_outcome" AS ENUM('passed', 'failed', 'not-run', 'not-applicable');--> statement-breakpoint
CREATE TYPE "public"."trial_language" AS ENUM('c', 'fortran', 'python');--> statement-breakpoint
CREATE TYPE "public"."trial_state" AS ENUM('waiting', 'running', 'passed', 'failed', 'refused');--> statement-breakpoint
CREATE TABLE "adoptions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"purpose" text NOT NULL,
	"revision_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"acknowledged_at" timestamp with time zone,
	"ended_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "adoption_names_a_code" CHECK (length(btrim("adoptions"."code")) > 0)
);
--> statement-breakpoint
CREATE TABLE "entries" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"letters" "call_letters" NOT NULL,
	"number" integer NOT NULL,
	"slug" text NOT NULL,
	"kind" "entry_kind" NOT NULL,
	"equation" "equation",
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_call_number_per_entry" UNIQUE("letters","number"),
	CONSTRAINT "one_address_per_entry" UNIQUE("slug"),
	CONSTRAINT "call_number_has_up_to_four_figures" CHECK ("entries"."number" between 1 and 9999),
	CONSTRAINT "slug_is_an_address" CHECK ("entries"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length("entries"."slug") <= 80),
	CONSTRAINT "only_schemes_have_an_equation" CHECK (("entries"."kind" = 'scheme') = ("entries"."equation" is not null))
);
--> statement-breakpoint
CREATE TABLE "events" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "events_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"kind" text NOT NULL,
	"actor_id" uuid,
	"subject_id" uuid,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"reason" text,
	"data" jsonb DEFAULT '{}'::jsonb NOT NULL
);
--> statement-breakpoint
CREATE TABLE "letters" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"kind" "letter_kind" NOT NULL,
	"recipient_id" uuid NOT NULL,
	"payload" jsonb NOT NULL,
	"state" "letter_state" DEFAULT 'waiting' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"next_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_error" text,
	"sent_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sent_means_dated" CHECK (("letters"."state" = 'sent') = ("letters"."sent_at" is not null))
);
--> statement-breakpoint
CREATE TABLE "settings" (
	"only_row" boolean PRIMARY KEY DEFAULT true NOT NULL,
	"signatures_needed" integer DEFAULT 2 NOT NULL,
	CONSTRAINT "settings_have_one_row" CHECK ("settings"."only_row"),
	CONSTRAINT "somebody_signs" CHECK ("settings"."signatures_needed" between 1 and 9)
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"role" "person_role" DEFAULT 'reader' NOT NULL,
	"password_hash" text,
	"session_version" integer DEFAULT 1 NOT NULL,
	"disabled_at" timestamp with time zone,
	"demo" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_account_per_email" UNIQUE("email"),
	CONSTRAINT "email_is_lower_case" CHECK ("people"."email" = lower("people"."email") and "people"."email" like '%_@_%'),
	CONSTRAINT "person_has_a_name" CHECK (length(btrim("people"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "sign_in_attempts" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "sign_in_attempts_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"email" text NOT NULL,
	"address" text NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"succeeded" boolean DEFAULT false NOT NULL
);
--> statement-breakpoint
CREATE TABLE "remarks" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"answers_id" uuid,
	"part" text NOT NULL,
	"text" text NOT NULL,
	"settled_at" timestamp with time zone,
	"settled_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "remark_says_something" CHECK (length(btrim("remarks"."text")) > 0),
	CONSTRAINT "settled_by_someone" CHECK (("remarks"."settled_at" is null) = ("remarks"."settled_by_id" is null))
);
--> statement-breakpoint
CREATE TABLE "signatures" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"revision_version" integer DEFAULT 0 NOT NULL,
	"points" text[] NOT NULL,
	"sentence" text NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_signature_per_person" UNIQUE("revision_id","person_id","revision_version"),
	CONSTRAINT "every_point_is_ticked" CHECK ("signatures"."points" @> array['definition', 'facts', 'start-up', 'naming']::text[]),
	CONSTRAINT "signature_has_a_sentence" CHECK (length(btrim("signatures"."sentence")) > 0)
);
--> statement-breakpoint
CREATE TABLE "revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"entry_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"state" "revision_state" DEFAULT 'draft' NOT NULL,
	"state_reason" text,
	"state_since" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"author_id" uuid NOT NULL,
	"title" text NOT NULL,
	"gist" text DEFAULT '' NOT NULL,
	"synonyms" text[] DEFAULT '{}' NOT NULL,
	"definition" jsonb NOT NULL,
	"notes" text DEFAULT '' NOT NULL,
	"references" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"change_note" text DEFAULT '' NOT NULL,
	"verdict" "analysis_verdict" NOT NULL,
	"facts" jsonb,
	"summary" jsonb,
	"problems" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"engine_version" text NOT NULL,
	"submitted_at" timestamp with time zone,
	"vetted_at" timestamp with time zone,
	"replaced_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_number_per_entry" UNIQUE("entry_id","number"),
	CONSTRAINT "revision_number_is_positive" CHECK ("revisions"."number" >= 1),
	CONSTRAINT "revision_has_a_title" CHECK (length(btrim("revisions"."title")) between 1 and 200),
	CONSTRAINT "vetted_means_dated" CHECK (("revisions"."state" in ('vetted', 'superseded', 'withdrawn')) = ("revisions"."vetted_at" is not null)),
	CONSTRAINT "vetted_means_facts" CHECK ("revisions"."vetted_at" is null or ("revisions"."facts" is not null and "revisions"."summary" is not null)),
	CONSTRAINT "superseded_names_its_replacement" CHECK ("revisions"."state" <> 'superseded' or "revisions"."replaced_by_id" is not null),
	CONSTRAINT "nothing_replaces_itself" CHECK ("revisions"."replaced_by_id" <> "revisions"."id"),
	CONSTRAINT "returned_and_withdrawn_say_why" CHECK ("revisions"."state" not in ('returned', 'withdrawn') or length(btrim(coalesce("revisions"."state_reason", ''))) > 0)
);
--> statement-breakpoint
CREATE TABLE "findings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"trial_id" uuid NOT NULL,
	"name" "finding_name" NOT NULL,
	"language" "trial_language",
	"outcome" "finding_outcome" NOT NULL,
	"measured" text NOT NULL,
	"target" text NOT NULL,
	"how" text NOT NULL,
	"data" jsonb,
	CONSTRAINT "one_finding_per_name_and_language" UNIQUE NULLS NOT DISTINCT("trial_id","name","language")
);
--> statement-breakpoint
CREATE TABLE "trials" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"revision_version" integer DEFAULT 0 NOT NULL,
	"state" "trial_state" DEFAULT 'waiting' NOT NULL,
	"queued_by_id" uuid NOT NULL,
	"queued_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"progress" jsonb DEFAULT '{"done":0,"total":0,"label":"waiting"}'::jsonb NOT NULL,
	"note" text,
	"toolchain" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"generator_release" text DEFAULT '' NOT NULL,
	"answers" jsonb
);
--> statement-breakpoint
CREATE TABLE "workers" (
	"id" text PRIMARY KEY NOT NULL,
	"seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sandbox_mode" text,
	"toolchain" jsonb DEFAULT '[]'::jsonb NOT NULL
);
--> statement-breakpoint
ALTER TABLE "adoptions" ADD CONSTRAINT "adoptions_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "adoptions" ADD CONSTRAINT "adoptions_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "events" ADD CONSTRAINT "events_actor_id_people_id_fk" FOREIGN KEY ("actor_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "letters" ADD CONSTRAINT "letters_recipient_id_people_id_fk" FOREIGN KEY ("recipient_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_answers_id_remarks_id_fk" FOREIGN KEY ("answers_id") REFERENCES "public"."remarks"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_settled_by_id_people_id_fk" FOREIGN KEY ("settled_by_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_entry_id_entries_id_fk" FOREIGN KEY ("entry_id") REFERENCES "public"."entries"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_replaced_by_id_revisions_id_fk" FOREIGN KEY ("replaced_by_id") REFERENCES "public"."revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_trial_id_trials_id_fk" FOREIGN KEY ("trial_id") REFERENCES "public"."trials"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trials" ADD CONSTRAINT "trials_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trials" ADD CONSTRAINT "trials_queued_by_id_people_id_fk" FOREIGN KEY ("queued_by_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "one_running_adoption_per_code" ON "adoptions" USING btree ("code","revision_id") WHERE "adoptions"."ended_at" is null;--> statement-breakpoint
CREATE INDEX "adoptions_by_revision" ON "adoptions" USING btree ("revision_id");--> statement-breakpoint
CREATE INDEX "adoptions_by_person" ON "adoptions" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "events_by_subject" ON "events" USING btree ("subject_id","id");--> statement-breakpoint
CREATE INDEX "events_by_actor" ON "events" USING btree ("actor_id","id");--> statement-breakpoint
CREATE INDEX "events_by_kind" ON "events" USING btree ("kind","id");--> statement-breakpoint
CREATE INDEX "letters_to_send" ON "letters" USING btree ("next_at") WHERE "letters"."state" = 'waiting';--> statement-breakpoint
CREATE INDEX "sign_in_attempts_by_email" ON "sign_in_attempts" USING btree ("email","at");--> statement-breakpoint
CREATE INDEX "sign_in_attempts_by_address" ON "sign_in_attempts" USING btree ("address","at");--> statement-breakpoint
CREATE INDEX "remarks_by_revision" ON "remarks" USING btree ("revision_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "one_vetted_revision_per_entry" ON "revisions" USING btree ("entry_id") WHERE "revisions"."state" = 'vetted';--> statement-breakpoint
CREATE INDEX "revisions_by_state" ON "revisions" USING btree ("state","state_since");--> statement-breakpoint
CREATE INDEX "revisions_by_author" ON "revisions" USING btree ("author_id","state");--> statement-breakpoint
CREATE INDEX "published_revisions_by_verdict" ON "revisions" USING btree (("summary" ->> 'verdict')) WHERE "revisions"."state" in ('vetted', 'superseded', 'withdrawn');--> statement-breakpoint
CREATE INDEX "published_revisions_by_order" ON "revisions" USING btree ((("summary" ->> 'orderTime')::int),(("summary" ->> 'orderSpace')::int)) WHERE "revisions"."state" in ('vetted', 'superseded', 'withdrawn');--> statement-breakpoint
CREATE INDEX "trials_by_revision" ON "trials" USING btree ("revision_id","queued_at");--> statement-breakpoint
CREATE INDEX "trials_by_state" ON "trials" USING btree ("state","queued_at");