CREATE TYPE "public"."attachment_type" AS ENUM('application/pdf', 'image/png', 'image/svg+xml', 'text/csv');--> statement-breakpoint
CREATE TABLE "attachments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"name" text NOT NULL,
	"type" "attachment_type" NOT NULL,
	"size" integer NOT NULL,
	"sha256" text NOT NULL,
	"bytes" "bytea" NOT NULL,
	"added_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "attachment_has_a_name" CHECK (length("attachments"."name") between 1 and 120),
	CONSTRAINT "attachment_is_at_most_10_mb" CHECK ("attachments"."size" between 1 and 10485760 and length("attachments"."bytes") = "attachments"."size")
);
--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_added_by_id_people_id_fk" FOREIGN KEY ("added_by_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachments_by_revision" ON "attachments" USING btree ("revision_id","created_at");--> statement-breakpoint
CREATE FUNCTION attachments_are_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  of_revision uuid := coalesce(NEW.revision_id, OLD.revision_id);
BEGIN
  IF TG_OP = 'UPDATE' THEN
    PERFORM refuse('attachments_are_frozen', 'An attachment is added or removed, never changed.');
  END IF;
  -- Locked, so that a submission at the same moment waits for the file or forbids it.
  PERFORM FROM revisions WHERE id = of_revision AND state IN ('draft', 'returned') FOR SHARE;
  IF NOT FOUND THEN
    PERFORM refuse('attachments_are_frozen', 'The attachments of a revision change in draft and returned only.');
  END IF;
  RETURN coalesce(NEW, OLD);
END $$;--> statement-breakpoint
CREATE TRIGGER attachments_are_frozen BEFORE INSERT OR UPDATE OR DELETE ON "attachments"
  FOR EACH ROW EXECUTE FUNCTION attachments_are_frozen();
