-- What must be true of the book whoever writes to it: the moves of a revision, frozen content, signatures,
-- the ledger. Each refusal carries the name of its rule as the constraint, as a broken check would.

INSERT INTO "settings" DEFAULT VALUES;--> statement-breakpoint

CREATE FUNCTION refuse(rule text, sentence text) RETURNS void LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '%', sentence USING ERRCODE = 'check_violation', CONSTRAINT = rule;
END $$;--> statement-breakpoint

CREATE FUNCTION revision_is_born_a_draft() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NEW.state <> 'draft' THEN
    PERFORM refuse('revision_is_born_a_draft', 'A revision begins as a draft, not as ' || NEW.state || '.');
  END IF;
  NEW.version := 1;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER revision_is_born_a_draft BEFORE INSERT ON "revisions"
  FOR EACH ROW EXECUTE FUNCTION revision_is_born_a_draft();--> statement-breakpoint

CREATE FUNCTION revision_keeps_the_rules() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  content_changed boolean :=
    (NEW.title, NEW.gist, NEW.synonyms, NEW.definition, NEW.notes, NEW."references", NEW.change_note,
     NEW.verdict, NEW.facts, NEW.summary, NEW.problems, NEW.engine_version)
    IS DISTINCT FROM
    (OLD.title, OLD.gist, OLD.synonyms, OLD.definition, OLD.notes, OLD."references", OLD.change_note,
     OLD.verdict, OLD.facts, OLD.summary, OLD.problems, OLD.engine_version);
  signed integer;
  needed integer;
  latest_trial trial_state;
BEGIN
  IF (NEW.id, NEW.entry_id, NEW.number, NEW.author_id, NEW.created_at)
     IS DISTINCT FROM (OLD.id, OLD.entry_id, OLD.number, OLD.author_id, OLD.created_at) THEN
    PERFORM refuse('revision_keeps_its_identity', 'Entry, number and author of a revision never change.');
  END IF;

  IF content_changed AND OLD.state NOT IN ('draft', 'returned') THEN
    PERFORM refuse('content_is_frozen', 'The content of a revision that is ' || OLD.state || ' cannot be changed.');
  END IF;
  -- The stamp is the database's own, so that no writer can forget it.
  NEW.version := OLD.version + content_changed::integer;
  IF content_changed THEN NEW.updated_at := now(); END IF;

  IF NEW.state <> OLD.state AND (OLD.state, NEW.state) NOT IN (
    ('draft', 'in-review'), ('returned', 'in-review'), ('in-review', 'draft'), ('in-review', 'returned'),
    ('in-review', 'vetted'), ('vetted', 'superseded'), ('vetted', 'withdrawn'), ('superseded', 'withdrawn')
  ) THEN
    PERFORM refuse('allowed_moves_only', 'A revision does not go from ' || OLD.state || ' to ' || NEW.state || '.');
  END IF;

  IF OLD.vetted_at IS NOT NULL AND NEW.vetted_at IS DISTINCT FROM OLD.vetted_at THEN
    PERFORM refuse('vetted_date_stands', 'The date of a vetting never changes.');
  END IF;

  IF NEW.state = OLD.state THEN
    RETURN NEW;
  END IF;
  NEW.state_since := now();

  IF NEW.state = 'in-review' THEN
    IF NEW.verdict <> 'facts' THEN
      PERFORM refuse('submitted_means_valid', 'A definition without facts cannot be submitted.');
    END IF;
    NEW.submitted_at := now();
  END IF;

  IF NEW.state = 'superseded' AND NOT EXISTS (
    SELECT FROM revisions r WHERE r.id = NEW.replaced_by_id AND r.entry_id = NEW.entry_id AND r.number > NEW.number
  ) THEN
    PERFORM refuse('superseded_by_a_later_revision', 'A revision is superseded by a later one of its own entry.');
  END IF;

  IF NEW.state = 'vetted' THEN
    SELECT signatures_needed INTO needed FROM settings;
    SELECT count(DISTINCT s.person_id) INTO signed FROM signatures s
      WHERE s.revision_id = NEW.id AND s.revision_version = NEW.version AND s.person_id <> NEW.author_id;
    IF signed < needed THEN
      PERFORM refuse('vetted_means_signed', signed || ' of ' || needed || ' signatures are there.');
    END IF;
    SELECT t.state INTO latest_trial FROM trials t
      WHERE t.revision_id = NEW.id AND t.revision_version = NEW.version ORDER BY t.queued_at DESC, t.id LIMIT 1;
    IF latest_trial IS DISTINCT FROM 'passed' THEN
      PERFORM refuse('vetted_means_tried', 'The latest trial of this text has not passed.');
    END IF;
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER revision_keeps_the_rules BEFORE UPDATE ON "revisions"
  FOR EACH ROW EXECUTE FUNCTION revision_keeps_the_rules();--> statement-breakpoint

CREATE FUNCTION only_drafts_are_deleted() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state <> 'draft' THEN
    PERFORM refuse('only_drafts_are_deleted', 'Only a draft can be deleted; this revision is ' || OLD.state || '.');
  END IF;
  RETURN OLD;
END $$;--> statement-breakpoint
CREATE TRIGGER only_drafts_are_deleted BEFORE DELETE ON "revisions"
  FOR EACH ROW EXECUTE FUNCTION only_drafts_are_deleted();--> statement-breakpoint

CREATE FUNCTION signature_keeps_the_rules() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  signed_revision revisions%ROWTYPE;
  signer people%ROWTYPE;
BEGIN
  -- Share lock: the revision neither moves nor changes its text while it is being signed.
  SELECT * INTO signed_revision FROM revisions WHERE id = NEW.revision_id FOR SHARE;
  SELECT * INTO signer FROM people WHERE id = NEW.person_id;
  IF signed_revision.state IS DISTINCT FROM 'in-review' THEN
    PERFORM refuse('signed_in_review_only', 'Only a revision in review can be signed.');
  END IF;
  IF signed_revision.author_id = NEW.person_id THEN
    PERFORM refuse('authors_do_not_sign', 'Authors cannot sign their own revision.');
  END IF;
  IF signer.role NOT IN ('maintainer', 'administrator') OR signer.disabled_at IS NOT NULL THEN
    PERFORM refuse('maintainers_sign', 'Only a maintainer can sign a revision.');
  END IF;
  NEW.revision_version := signed_revision.version;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER signature_keeps_the_rules BEFORE INSERT ON "signatures"
  FOR EACH ROW EXECUTE FUNCTION signature_keeps_the_rules();--> statement-breakpoint

CREATE FUNCTION trial_stands_for_a_text() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  SELECT version INTO NEW.revision_version FROM revisions WHERE id = NEW.revision_id FOR SHARE;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER trial_stands_for_a_text BEFORE INSERT ON "trials"
  FOR EACH ROW EXECUTE FUNCTION trial_stands_for_a_text();--> statement-breakpoint

CREATE FUNCTION only_grows() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM refuse(TG_TABLE_NAME || '_only_grow', 'Rows of ' || TG_TABLE_NAME || ' are added, never changed or deleted.');
  RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER events_only_grow BEFORE UPDATE OR DELETE ON "events"
  FOR EACH ROW EXECUTE FUNCTION only_grows();--> statement-breakpoint
CREATE TRIGGER events_are_not_truncated BEFORE TRUNCATE ON "events"
  FOR EACH STATEMENT EXECUTE FUNCTION only_grows();--> statement-breakpoint
CREATE TRIGGER signatures_only_grow BEFORE UPDATE OR DELETE ON "signatures"
  FOR EACH ROW EXECUTE FUNCTION only_grows();--> statement-breakpoint
CREATE TRIGGER signatures_are_not_truncated BEFORE TRUNCATE ON "signatures"
  FOR EACH STATEMENT EXECUTE FUNCTION only_grows();--> statement-breakpoint
CREATE TRIGGER revisions_are_not_truncated BEFORE TRUNCATE ON "revisions"
  FOR EACH STATEMENT EXECUTE FUNCTION only_grows();
