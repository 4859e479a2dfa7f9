-- What the schema files cannot say: the application's role, the door's function, forced row-level security, and what can only be added to.

-- Where a database administrator has made the role already, as in production, this does nothing.
DO $$
BEGIN
  IF NOT EXISTS (SELECT FROM pg_roles WHERE rolname = 'undercroft_app') THEN
    CREATE ROLE undercroft_app NOLOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS;
  END IF;
END
$$;
--> statement-breakpoint
ALTER TABLE audit_events FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE closed_days FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE beers FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE vessels FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE memberships FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
-- Tables that are only ever added to get this function as a trigger, so that the owner is bound by it too.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'rows of % are never changed or removed', TG_TABLE_NAME USING ERRCODE = 'insufficient_privilege';
END
$$;
--> statement-breakpoint
CREATE TRIGGER audit_events_refuse_change BEFORE UPDATE OR DELETE ON audit_events FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER audit_events_refuse_truncate BEFORE TRUNCATE ON audit_events FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- Opens the transaction for the person and the brewery of a session, and says who that is; no row if the session is none or over.
-- In the database, so that a request pays one round trip for it. Runs with the caller's rights: the policies hold.
CREATE FUNCTION enter_session(session_hash text, present timestamptz)
RETURNS TABLE (
  user_id uuid, user_name text, user_email text,
  brewery_id uuid, brewery_name text, time_zone text,
  role public.role, access_until date
)
LANGUAGE plpgsql AS $$
DECLARE
  entered public.sessions%ROWTYPE;
BEGIN
  SELECT * INTO entered FROM public.sessions s
  WHERE s.token_hash = session_hash AND s.expires_at > present AND s.last_seen_at > present - interval '14 days';
  IF NOT FOUND THEN
    RETURN;
  END IF;
  IF entered.last_seen_at < present - interval '1 hour' THEN
    UPDATE public.sessions s SET last_seen_at = present WHERE s.token_hash = session_hash;
  END IF;
  PERFORM set_config('undercroft.person', entered.user_id::text, true);
  PERFORM set_config('undercroft.brewery', coalesce(entered.brewery_id::text, ''), true);
  RETURN QUERY
    SELECT u.id, u.name, u.email, b.id, b.name, b.time_zone, m.role, m.access_until
    FROM public.users u
    LEFT JOIN public.memberships m ON m.brewery_id = entered.brewery_id AND m.user_id = u.id AND m.ended_at IS NULL
    LEFT JOIN public.breweries b ON b.id = m.brewery_id
    WHERE u.id = entered.user_id;
END
$$;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON users, sessions, tokens, sign_in_attempts TO undercroft_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON breweries, memberships TO undercroft_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON closed_days, beers, vessels TO undercroft_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON audit_events TO undercroft_app;
--> statement-breakpoint
GRANT USAGE ON SCHEMA drizzle TO undercroft_app;
--> statement-breakpoint
GRANT SELECT ON drizzle.__drizzle_migrations TO undercroft_app;
