-- The ledger is only ever added to: by grant for the application, by trigger for everybody.
ALTER TABLE brews FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE acts FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE movements FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE reversals FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE ledger_notes FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE vessel_events FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
DO $$
DECLARE
  added_to text;
BEGIN
  FOREACH added_to IN ARRAY ARRAY['acts', 'movements', 'reversals', 'ledger_notes', 'vessel_events'] LOOP
    EXECUTE format('CREATE TRIGGER %I BEFORE UPDATE OR DELETE ON %I FOR EACH ROW EXECUTE FUNCTION refuse_change()', added_to || '_refuse_change', added_to);
    EXECUTE format('CREATE TRIGGER %I BEFORE TRUNCATE ON %I FOR EACH STATEMENT EXECUTE FUNCTION refuse_change()', added_to || '_refuse_truncate', added_to);
    EXECUTE format('GRANT SELECT, INSERT ON %I TO undercroft_app', added_to);
  END LOOP;
END
$$;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON brews TO undercroft_app;
