-- What generated migrations can't say: extensions, and the role that the web and job processes connect as.
-- The role owns nothing and may not bypass row-level security; its password is set by docker-free-scripts/db.sh.
CREATE EXTENSION IF NOT EXISTS pg_trgm;--> statement-breakpoint
DO $$ BEGIN
  IF NOT EXISTS (SELECT 1 FROM pg_roles WHERE rolname = 'ohmstead_app') THEN
    CREATE ROLE ohmstead_app LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS;
  END IF;
END $$;
