-- Row-level security for every tenant table, the grants of each role, and the few look-ups that
-- must work before an academy is known.

-- Puts a tenant table behind the wall: forced, so that its owner is held too, and with a check.
CREATE FUNCTION protect_tenant_table(tenant_table regclass) RETURNS void LANGUAGE plpgsql AS $$
BEGIN
  EXECUTE format('ALTER TABLE %s ENABLE ROW LEVEL SECURITY', tenant_table);
  EXECUTE format('ALTER TABLE %s FORCE ROW LEVEL SECURITY', tenant_table);
  EXECUTE format(
    $policy$CREATE POLICY own_academy ON %s
      USING (academy_id = nullif(current_setting('app.academy_id', true), '')::uuid)
      WITH CHECK (academy_id = nullif(current_setting('app.academy_id', true), '')::uuid)$policy$,
    tenant_table);
END $$;
REVOKE ALL ON FUNCTION protect_tenant_table FROM PUBLIC;

SELECT protect_tenant_table(name::regclass) FROM unnest(ARRAY[
  'academies', 'memberships', 'venues', 'areas', 'coaches', 'invitations', 'golfers', 'consents',
  'minor_look_ups', 'clinics', 'clinic_coaches', 'clinic_areas', 'sessions', 'session_coaches',
  'session_areas', 'enrolments', 'places', 'waitlist_entries', 'marks', 'mark_history',
  'ledger_accounts', 'transfers', 'entries', 'orders', 'payments', 'owed_places', 'refunds',
  'credit_changes', 'mails'
]) AS name;

GRANT USAGE ON SCHEMA public TO marram_app, marram_dispatch, marram_sees_all;

GRANT SELECT, INSERT, UPDATE, DELETE ON
  accounts, account_identities, account_links, sign_in_sessions, attempts,
  memberships, venues, areas, coaches, invitations, golfers,
  clinics, clinic_coaches, clinic_areas, sessions, session_coaches, session_areas,
  enrolments, places, waitlist_entries, marks
TO marram_app;
GRANT SELECT, INSERT, UPDATE ON
  academies, consents, orders, payments, owed_places, refunds, mails, account_mails,
  silenced_addresses
TO marram_app;

-- What is history may be added to and read, never changed. The column that proves a transfer was
-- written at once is the database's to fill.
GRANT SELECT, INSERT ON
  minor_look_ups, mark_history, credit_changes, provider_events, ledger_accounts, entries
TO marram_app;
GRANT SELECT ON transfers TO marram_app;
GRANT INSERT (academy_id, id, kind, source_type, source_id, revision, what, happened_on, posted_at)
  ON transfers TO marram_app;

-- The dispatcher asks, across academies, only what is due.
GRANT SELECT (academy_id, id, state, held_until) ON enrolments TO marram_dispatch;
GRANT SELECT (academy_id, place_id, choice, choose_by) ON owed_places TO marram_dispatch;
GRANT SELECT (academy_id, id, state, created_at) ON refunds TO marram_dispatch;
GRANT SELECT (id_hash, expires_at), DELETE ON sign_in_sessions TO marram_dispatch;
GRANT SELECT, DELETE ON attempts TO marram_dispatch;
CREATE POLICY due ON enrolments FOR SELECT TO marram_dispatch USING (true);
CREATE POLICY due ON owed_places FOR SELECT TO marram_dispatch USING (true);
CREATE POLICY due ON refunds FOR SELECT TO marram_dispatch USING (true);

GRANT SELECT ON academies, memberships, invitations, transfers, entries TO marram_sees_all;

CREATE FUNCTION find_academy_by_slug(wanted text) RETURNS uuid
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
AS $$ SELECT academy_id FROM public.academies WHERE slug = wanted $$;

CREATE FUNCTION find_academy_by_payments_account(wanted text) RETURNS uuid
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
AS $$ SELECT academy_id FROM public.academies WHERE payments_account = wanted $$;

CREATE FUNCTION find_academy_by_invitation(wanted bytea) RETURNS uuid
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
AS $$ SELECT academy_id FROM public.invitations WHERE token_hash = wanted $$;

CREATE FUNCTION list_memberships_of(wanted uuid)
RETURNS TABLE (slug text, name text, accent text, accent_dusk text, role text)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
AS $$
  SELECT a.slug, a.name, a.accent, a.accent_dusk, m.role
  FROM public.memberships m JOIN public.academies a USING (academy_id)
  WHERE m.account_id = wanted ORDER BY a.name, m.role
$$;

CREATE FUNCTION list_published_academies()
RETURNS TABLE (slug text, name text, place text, accent text)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
AS $$
  SELECT slug, name, place, accent FROM public.academies
  WHERE published_at IS NOT NULL ORDER BY name LIMIT 50
$$;

DO $$
DECLARE signature text;
BEGIN
  FOREACH signature IN ARRAY ARRAY[
    'find_academy_by_slug(text)', 'find_academy_by_payments_account(text)',
    'find_academy_by_invitation(bytea)', 'list_memberships_of(uuid)', 'list_published_academies()',
    'check_transfer()'
  ] LOOP
    EXECUTE format('REVOKE ALL ON FUNCTION %s FROM PUBLIC', signature);
    EXECUTE format('ALTER FUNCTION %s OWNER TO marram_sees_all', signature);
    EXECUTE format('GRANT EXECUTE ON FUNCTION %s TO marram_app', signature);
  END LOOP;
END $$;
