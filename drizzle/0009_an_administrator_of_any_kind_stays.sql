-- The demo's administrators keep a house as well as others while it is in demo mode, which the database does not
-- know of: outside it, the rule of the application leaves them out.
CREATE OR REPLACE FUNCTION an_administrator_stays() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.role <> 'administrator' OR OLD.disabled_at IS NOT NULL OR OLD.password_hash IS NULL
     OR (NEW.role = 'administrator' AND NEW.disabled_at IS NULL) THEN
    RETURN NEW;
  END IF;
  PERFORM pg_advisory_xact_lock(hashtextextended('an administrator stays', 0));
  IF NOT EXISTS (
    SELECT FROM people p WHERE p.id <> OLD.id AND p.role = 'administrator' AND p.disabled_at IS NULL
      AND p.password_hash IS NOT NULL
  ) THEN
    PERFORM refuse('an_administrator_stays', 'The last administrator cannot be removed.');
  END IF;
  RETURN NEW;
END $$;
