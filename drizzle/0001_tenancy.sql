-- The service works as a role that row-level security binds. FORCE binds the tables' owner too, so that only a
-- role with BYPASSRLS (the migrator) sees more than the shop of the transaction.
DO $$
BEGIN
  IF NOT EXISTS (SELECT FROM pg_roles WHERE rolname = 'witness_service') THEN
    CREATE ROLE witness_service NOLOGIN NOBYPASSRLS;
  END IF;
EXCEPTION WHEN duplicate_object OR unique_violation THEN NULL;
END $$;
--> statement-breakpoint
DO $$
BEGIN
  IF NOT pg_has_role(current_user, 'witness_service', 'MEMBER') THEN
    EXECUTE format('GRANT witness_service TO %I', current_user);
  END IF;
END $$;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO witness_service;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA public TO witness_service;
--> statement-breakpoint
GRANT USAGE ON ALL SEQUENCES IN SCHEMA public TO witness_service;
--> statement-breakpoint
ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT SELECT, INSERT, UPDATE, DELETE ON TABLES TO witness_service;
--> statement-breakpoint
ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT USAGE ON SEQUENCES TO witness_service;
--> statement-breakpoint
-- What was logged stays as it was; shops are made and removed by the migrator alone.
REVOKE UPDATE, DELETE ON audit_log FROM witness_service;
--> statement-breakpoint
REVOKE INSERT, DELETE ON shops FROM witness_service;
--> statement-breakpoint
CREATE FUNCTION current_shop_id() RETURNS uuid LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ SELECT NULLIF(current_setting('app.shop_id', true), '')::uuid $$;
--> statement-breakpoint
DO $$
DECLARE
  name text;
BEGIN
  FOR name IN
    SELECT c.table_name FROM information_schema.columns c
    WHERE c.table_schema = 'public' AND c.column_name = 'shop_id' AND c.table_name <> 'sessions'
  LOOP
    EXECUTE format('ALTER TABLE %I ENABLE ROW LEVEL SECURITY', name);
    EXECUTE format('ALTER TABLE %I FORCE ROW LEVEL SECURITY', name);
    EXECUTE format(
      'CREATE POLICY one_shop ON %I USING (shop_id = current_shop_id()) WITH CHECK (shop_id = current_shop_id())', name
    );
  END LOOP;
END $$;
--> statement-breakpoint
ALTER TABLE shops ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE shops FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY one_shop ON shops USING (id = current_shop_id()) WITH CHECK (id = current_shop_id());
--> statement-breakpoint
-- The three look-ups that come before a shop is known; each answers one narrow question.
CREATE FUNCTION memberships_of_user(of_user uuid)
  RETURNS TABLE (shop_id uuid, shop_name text, role text)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp
  AS $$
    SELECT m.shop_id, s.name, m.role FROM memberships m JOIN shops s ON s.id = m.shop_id
    WHERE m.user_id = of_user AND m.disabled_at IS NULL ORDER BY s.name
  $$;
--> statement-breakpoint
CREATE FUNCTION api_key_by_hash(of_hash text)
  RETURNS TABLE (shop_id uuid, id uuid, may_import boolean, may_read boolean)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp
  AS $$
    SELECT k.shop_id, k.id, k.may_import, k.may_read FROM api_keys k
    WHERE k.key_hash = of_hash AND k.revoked_at IS NULL
  $$;
--> statement-breakpoint
CREATE FUNCTION shop_id_by_name(of_name text) RETURNS uuid
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp
  AS $$ SELECT id FROM shops WHERE name = of_name $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION memberships_of_user(uuid), api_key_by_hash(text), shop_id_by_name(text) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION memberships_of_user(uuid), api_key_by_hash(text), shop_id_by_name(text) TO witness_service;
