-- Letters by wish, links that letters carry, sessions that can be listed and ended, the local mail catcher.

CREATE TYPE "public"."letter_wish" AS ENUM('at-once', 'daily', 'none');--> statement-breakpoint
CREATE TYPE "public"."link_purpose" AS ENUM('invitation', 'password-reset');--> statement-breakpoint
ALTER TYPE "public"."letter_state" ADD VALUE 'kept-back';--> statement-breakpoint
CREATE TABLE "caught_letters" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "caught_letters_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"sender" text NOT NULL,
	"recipient" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"arrived_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "links" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"purpose" "link_purpose" NOT NULL,
	"person_id" uuid NOT NULL,
	"hash" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"ended_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_link_per_secret" UNIQUE("hash"),
	CONSTRAINT "link_keeps_a_hash" CHECK ("links"."hash" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"user_agent" text NOT NULL,
	"address" text NOT NULL,
	"seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ended_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "people" ADD COLUMN "letter_wish" "letter_wish" DEFAULT 'at-once' NOT NULL;--> statement-breakpoint
ALTER TABLE "links" ADD CONSTRAINT "links_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "caught_letters_by_recipient" ON "caught_letters" USING btree ("recipient","id");--> statement-breakpoint
CREATE INDEX "links_by_person" ON "links" USING btree ("person_id","purpose");--> statement-breakpoint
CREATE INDEX "sessions_by_person" ON "sessions" USING btree ("person_id","seen_at");--> statement-breakpoint
CREATE INDEX "letters_by_age" ON "letters" USING btree ("created_at","id");--> statement-breakpoint
CREATE INDEX "letters_by_recipient" ON "letters" USING btree ("recipient_id");--> statement-breakpoint

-- A house without somebody who can open it to others would be lost. The lock lets two who leave at once do so one
-- after the other. The demo's accounts work in demo mode only, and stand in for nobody else.
CREATE FUNCTION an_administrator_stays() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.role <> 'administrator' OR OLD.disabled_at IS NOT NULL OR OLD.password_hash IS NULL
     OR (NEW.role = 'administrator' AND NEW.disabled_at IS NULL) THEN
    RETURN NEW;
  END IF;
  PERFORM pg_advisory_xact_lock(hashtextextended('an administrator stays', 0));
  IF NOT EXISTS (
    SELECT FROM people p WHERE p.id <> OLD.id AND p.role = 'administrator' AND p.disabled_at IS NULL
      AND p.password_hash IS NOT NULL AND (OLD.demo OR NOT p.demo)
  ) THEN
    PERFORM refuse('an_administrator_stays', 'The last administrator cannot be removed.');
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER an_administrator_stays BEFORE UPDATE ON "people"
  FOR EACH ROW EXECUTE FUNCTION an_administrator_stays();--> statement-breakpoint

CREATE FUNCTION tell_of_waiting_letters() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_notify('letter_waiting', '');
  RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER tell_of_waiting_letters AFTER INSERT ON "letters"
  FOR EACH STATEMENT EXECUTE FUNCTION tell_of_waiting_letters();
