-- Academies :first to :last, all of one shape: 10 coaches, 10 areas, 60 clinics of 8 weekly
-- sessions, and every account a golfer of each. In sets, and with the checks of foreign keys off,
-- so that a thousand stand within a minute. Ids are made from the academy's number and the row's.
SET LOCAL session_replication_role = replica;

-- A name's hash as an id of the form that the API takes.
CREATE OR REPLACE FUNCTION pg_temp.id_named(name text) RETURNS uuid LANGUAGE sql IMMUTABLE AS
$$ SELECT overlay(overlay(md5(name) placing '8' from 13) placing '8' from 17)::uuid $$;

CREATE OR REPLACE FUNCTION
  pg_temp.id_of(kind text, academy int, one int DEFAULT 0, two int DEFAULT 0)
RETURNS uuid LANGUAGE sql IMMUTABLE AS
$$ SELECT pg_temp.id_named(kind || ':' || academy || ':' || one || ':' || two) $$;

-- A third of the runs began last week and a third the week before.
CREATE OR REPLACE FUNCTION pg_temp.starts_at(clinic int, session int)
RETURNS timestamptz LANGUAGE sql STABLE AS
$$ SELECT date_trunc('hour', now()) + interval '3 hours' + clinic / 10 * interval '1 day'
     + (session - 1 - clinic % 3) * interval '7 days' $$;

INSERT INTO academies (academy_id, slug, name, place, lead, address, zone, locale, currency,
  accent, accent_dusk, tax_mode, tax_name, tax_basis_points, refund_tiers, waiver, safeguarding,
  hold_minutes, offer_hours, dusk_kind, owed_default, can_pay_at_desk, published_at, created_at)
SELECT pg_temp.id_of('academy', a), 'links-' || a, 'Links Academy ' || a, 'Ballyness',
  'Clinics on the dunes, in every light.', '1 Strand Road', 'Europe/Dublin', 'en-IE', 'EUR',
  '#1d5470', '#7fb2c9', 'included', 'VAT', 1350,
  '[{"noticeHours": 48, "refundBasisPoints": 10000}, {"noticeHours": 0, "refundBasisPoints": 0}]',
  'I take part at my own risk.', 'A second adult is always there.', 15, 12, 'sunset', 'credit',
  true, now(), now()
FROM generate_series(:first, :last) AS a;

INSERT INTO venues (academy_id, id, name, address, getting_here, latitude_deg, longitude_deg, zone,
  created_at)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('venue', a), 'The Strand', '1 Strand Road',
  'Left at the old pier.', 54.2, -8.5, 'Europe/Dublin', now()
FROM generate_series(:first, :last) AS a;

INSERT INTO areas (academy_id, id, venue_id, name, kind, units, has_lamps, is_covered, created_at)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('area', a, n), pg_temp.id_of('venue', a),
  'Range ' || n, 'range', 12, n % 2 = 0, n % 3 = 0, now()
FROM generate_series(:first, :last) AS a, generate_series(0, 9) AS n;

INSERT INTO coaches (academy_id, id, name, initials, about, created_at)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('coach', a, n), 'Coach ' || n, 'C' || n,
  'Teaches the short game first.', now() + n * interval '1 ms'
FROM generate_series(:first, :last) AS a, generate_series(0, 9) AS n;

INSERT INTO memberships (academy_id, account_id, role, created_at)
SELECT pg_temp.id_of('academy', a), id, 'golfer', now()
FROM generate_series(:first, :last) AS a, accounts;

INSERT INTO golfers (academy_id, id, account_id, name, handicap, created_at)
SELECT pg_temp.id_of('academy', a), pg_temp.id_named(a || ':' || id), id, name, 18, now()
FROM generate_series(:first, :last) AS a, accounts;

INSERT INTO clinics (academy_id, id, slug, title, summary, about, handicap_max, capacity,
  sale_mode, pay_mode, run_price_minor, drop_in_price_minor, venue_id, zone, starts_on_local,
  starts_at_local, duration_minutes, rrule, state, created_at)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('clinic', a, c), 'clinic-' || c,
  'Wedges to a number ' || c, 'Eight evenings from sixty metres in, with a number for each.',
  'Bring three wedges.', 36, 12, (ARRAY['both', 'run', 'both', 'drop-in'])[c % 4 + 1], 'card',
  16001 + c * 7, 2500 + c, pg_temp.id_of('venue', a), 'Europe/Dublin', current_date, '18:00', 60,
  'FREQ=WEEKLY;COUNT=8', 'published', now()
FROM generate_series(:first, :last) AS a, generate_series(0, 59) AS c;

INSERT INTO sessions (academy_id, id, clinic_id, number, held_on, starts_at, ends_at, dusk_at,
  capacity, held, confirmed)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('session', a, c, s),
  pg_temp.id_of('clinic', a, c), s, at::date, at, at + interval '1 hour',
  at + interval '30 minutes', 12, c % 2, (c + s) % 11
FROM generate_series(:first, :last) AS a, generate_series(0, 59) AS c,
  generate_series(1, 8) AS s, pg_temp.starts_at(c, s) AS at;

-- Only the first academy's claims are live: the index that keeps claims apart takes minutes to fill,
-- and no page reads it.
INSERT INTO session_areas (academy_id, session_id, area_id, position, units, during, is_live)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('session', a, c, s),
  pg_temp.id_of('area', a, c % 10), 0, '[1,6]', tstzrange(at, at + interval '1 hour'), a = 1
FROM generate_series(:first, :last) AS a, generate_series(0, 59) AS c,
  generate_series(1, 8) AS s, pg_temp.starts_at(c, s) AS at;

INSERT INTO session_coaches (academy_id, session_id, coach_id, position, during, is_live)
SELECT pg_temp.id_of('academy', a), pg_temp.id_of('session', a, c, s),
  pg_temp.id_of('coach', a, c % 10), 0, tstzrange(at, at + interval '1 hour'), a = 1
FROM generate_series(:first, :last) AS a, generate_series(0, 59) AS c,
  generate_series(1, 8) AS s, pg_temp.starts_at(c, s) AS at;

-- Three wait for every tenth clinic.
INSERT INTO waitlist_entries (academy_id, id, clinic_id, golfer_id, account_id, state, joined_at)
SELECT g.academy_id, pg_temp.id_of('waiting', a, c, g.n), pg_temp.id_of('clinic', a, c), g.id,
  g.account_id, 'waiting', now()
FROM generate_series(:first, :last) AS a, generate_series(0, 59, 10) AS c,
  LATERAL (SELECT *, row_number() OVER (ORDER BY id)::int AS n FROM golfers
    WHERE academy_id = pg_temp.id_of('academy', a) ORDER BY id LIMIT 3) AS g;
