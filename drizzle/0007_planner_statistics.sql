-- The planner knows nothing of tables that have just been filled, and then checks foreign keys by the wrong index.
-- Only their owner may analyze them; this does so where a table has more than doubled since it was last looked at.
CREATE FUNCTION refresh_statistics(of_tables text[]) RETURNS void
  LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp
  AS $$
DECLARE
  name text;
BEGIN
  FOR name IN
    SELECT c.relname FROM pg_class c
    WHERE c.relnamespace = 'public'::regnamespace AND c.relkind = 'r' AND c.relname = ANY (of_tables)
      AND pg_relation_size(c.oid) / current_setting('block_size')::int > 2 * greatest(c.relpages, 1)
    ORDER BY c.relname
  LOOP
    EXECUTE format('ANALYZE %I', name);
  END LOOP;
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION refresh_statistics(text[]) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION refresh_statistics(text[]) TO witness_service;
