ALTER TABLE "remarks" ADD COLUMN "language" text;--> statement-breakpoint
ALTER TABLE "remarks" ADD COLUMN "line" integer;--> statement-breakpoint
ALTER TABLE "remarks" ADD COLUMN "quote" text;--> statement-breakpoint
ALTER TABLE "remarks" ADD COLUMN "revision_version" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
CREATE UNIQUE INDEX "said_once" ON "remarks" USING btree ("revision_id","author_id",md5("part" || '|' || coalesce("language", '') || '|' || coalesce("line"::text, '') || '|' || coalesce("answers_id"::text, '') || '|' || "text"));--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "line_of_a_kernel" CHECK (("remarks"."line" is null) = ("remarks"."language" is null) and ("remarks"."line" is null) = ("remarks"."quote" is null) and ("remarks"."line" is null or ("remarks"."part" = 'kernel' and "remarks"."line" >= 1)));--> statement-breakpoint
CREATE FUNCTION remark_keeps_the_rules() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  answered remarks%ROWTYPE;
BEGIN
  SELECT version INTO NEW.revision_version FROM revisions WHERE id = NEW.revision_id FOR SHARE;
  IF NEW.answers_id IS NOT NULL THEN
    SELECT * INTO answered FROM remarks WHERE id = NEW.answers_id;
    IF answered.revision_id IS DISTINCT FROM NEW.revision_id OR answered.answers_id IS NOT NULL THEN
      PERFORM refuse('answers_follow_a_remark', 'An answer belongs to a remark on the same revision.');
    END IF;
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER remark_keeps_the_rules BEFORE INSERT ON "remarks"
  FOR EACH ROW EXECUTE FUNCTION remark_keeps_the_rules();--> statement-breakpoint
CREATE FUNCTION remarks_keep_their_words() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'DELETE' OR (OLD.id, OLD.revision_id, OLD.author_id, OLD.answers_id, OLD.part, OLD.language, OLD.line,
      OLD.quote, OLD.revision_version, OLD.text, OLD.created_at)
    IS DISTINCT FROM (NEW.id, NEW.revision_id, NEW.author_id, NEW.answers_id, NEW.part, NEW.language, NEW.line,
      NEW.quote, NEW.revision_version, NEW.text, NEW.created_at) THEN
    PERFORM refuse('remarks_keep_their_words', 'A remark is settled or reopened, never changed or deleted.');
  END IF;
  IF NEW.settled_at IS NOT NULL AND NEW.answers_id IS NOT NULL THEN
    PERFORM refuse('remarks_keep_their_words', 'A remark is settled with its answers, not an answer by itself.');
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER remarks_keep_their_words BEFORE UPDATE OR DELETE ON "remarks"
  FOR EACH ROW EXECUTE FUNCTION remarks_keep_their_words();
