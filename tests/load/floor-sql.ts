/**
 * The SQL that a careful hand would write for one purpose each, with nothing around it. It names
 * the academy itself, so that it runs as fast without row-level security as it can.
 */

const ISO = `'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'`

/** The public page as its JSON, by the academy's slug ($1) at a moment ($2). */
export const PAGE = `
  WITH academy AS MATERIALIZED (SELECT * FROM academies WHERE slug = $1),
  ahead AS (
    SELECT s.clinic_id, count(*) AS ahead, min(s.starts_at) AS starts_at,
      max(s.held + s.confirmed) AS fullest,
      (array_agg(s.held + s.confirmed ORDER BY s.starts_at))[1] AS next_taken,
      (array_agg(s.ends_at ORDER BY s.starts_at))[1] AS ends_at,
      (array_agg(s.id ORDER BY s.starts_at))[1] AS next_id,
      (array_agg(s.capacity ORDER BY s.held + s.confirmed DESC))[1] AS capacity
    FROM sessions s
    WHERE s.academy_id = (SELECT academy_id FROM academy)
      AND s.state = 'planned' AND s.starts_at > $2
    GROUP BY s.clinic_id),
  totals AS (
    SELECT clinic_id, count(*) AS total FROM sessions
    WHERE academy_id = (SELECT academy_id FROM academy) GROUP BY clinic_id),
  waiting AS (
    SELECT clinic_id, count(*) AS waiting FROM waitlist_entries
    WHERE academy_id = (SELECT academy_id FROM academy) AND state = 'waiting'
    GROUP BY clinic_id),
  clinic AS (
    SELECT a.starts_at, c.slug, json_build_object(
      'slug', c.slug, 'title', c.title, 'summary', c.summary,
      'startsAt', to_char(a.starts_at AT TIME ZONE 'UTC', ${ISO}),
      'endsAt', to_char(a.ends_at AT TIME ZONE 'UTC', ${ISO}), 'zone', c.zone,
      'sessionsAhead', a.ahead, 'sessionsTotal', t.total,
      'areas', (SELECT coalesce(json_agg(ar.name ORDER BY sa.position), '[]')
        FROM session_areas sa JOIN areas ar USING (academy_id)
        WHERE sa.academy_id = c.academy_id AND sa.session_id = a.next_id AND ar.id = sa.area_id),
      'coaches', (SELECT coalesce(json_agg(co.name ORDER BY sc.position), '[]')
        FROM session_coaches sc JOIN coaches co USING (academy_id)
        WHERE sc.academy_id = c.academy_id AND sc.session_id = a.next_id AND co.id = sc.coach_id),
      'capacity', a.capacity, 'waiting', coalesce(w.waiting, 0),
      'saleMode', c.sale_mode, 'payMode', c.pay_mode,
      'dropInPriceMinor', c.drop_in_price_minor, 'handicapMin', c.handicap_min,
      'handicapMax', c.handicap_max, 'ageMin', c.age_min, 'ageMax', c.age_max,
      'taken', CASE WHEN c.sale_mode = 'drop-in' THEN a.next_taken ELSE a.fullest END,
      'runPriceMinor', c.run_price_minor / t.total * a.ahead
        + greatest(c.run_price_minor % t.total - (t.total - a.ahead), 0)) AS shown
    FROM clinics c JOIN ahead a ON a.clinic_id = c.id JOIN totals t ON t.clinic_id = c.id
      LEFT JOIN waiting w ON w.clinic_id = c.id
    WHERE c.academy_id = (SELECT academy_id FROM academy) AND c.state = 'published')
  SELECT json_build_object(
    'academy', json_build_object(
      'slug', slug, 'name', name, 'place', place, 'lead', lead, 'address', address,
      'zone', zone, 'locale', locale, 'currency', currency, 'accent', accent,
      'accentDusk', accent_dusk, 'taxMode', tax_mode, 'taxName', tax_name,
      'taxBasisPoints', tax_basis_points, 'refundTiers', refund_tiers, 'waiver', waiver,
      'safeguarding', safeguarding, 'duskKind', dusk_kind, 'holdMinutes', hold_minutes,
      'canPayAtDesk', can_pay_at_desk, 'isPublished', published_at IS NOT NULL),
    'clinics', (SELECT coalesce(json_agg(shown ORDER BY starts_at, slug), '[]') FROM clinic),
    'coaches', (SELECT coalesce(json_agg(json_build_object('name', name, 'initials', initials,
      'about', about) ORDER BY created_at), '[]') FROM coaches WHERE academy_id = a.academy_id),
    'venues', (SELECT coalesce(json_agg(json_build_object('name', name, 'address', address,
      'gettingHere', getting_here) ORDER BY created_at), '[]') FROM venues
      WHERE academy_id = a.academy_id)) AS page
  FROM academy a`

/** Begins a transaction inside an academy, in one message. The id is one of ours, so it is safe. */
export const beginIn = (academyId: string): string =>
  `BEGIN; SELECT set_config('app.academy_id', '${academyId}', true)`

/** As `beginIn`, for reading, by an address. */
export const beginReadingAt = (slug: string): string =>
  `BEGIN READ ONLY; SELECT set_config('app.academy_id',
     coalesce(find_academy_by_slug('${slug}')::text, ''), true)`

/** The person behind a sign-in session, by the hash of its id ($1). */
export const WHO_ASKS = `
  SELECT a.id, a.name, a.email FROM sign_in_sessions s JOIN accounts a ON a.id = s.account_id
  WHERE s.id_hash = $1 AND s.expires_at > now() AND s.session_version = a.session_version`

/**
 * What a hold of one session must know ($1 academy, $2 session, $3 account): what it costs with tax
 * in it, for how long it is held, what is agreed to, who takes it, and that they have none yet.
 */
export const READ_FOR_HOLD = `
  SELECT c.id AS clinic_id, c.drop_in_price_minor AS price_minor,
    round(c.drop_in_price_minor * a.tax_basis_points / (10000.0 + a.tax_basis_points)) AS tax_minor,
    a.currency, a.hold_minutes, a.waiver, g.id AS golfer_id
  FROM sessions s
    JOIN clinics c ON c.academy_id = s.academy_id AND c.id = s.clinic_id
    JOIN academies a ON a.academy_id = s.academy_id
    JOIN golfers g ON g.academy_id = s.academy_id AND g.account_id = $3
  WHERE s.academy_id = $1 AND s.id = $2 AND s.state = 'planned' AND s.starts_at > now()
    AND c.state = 'published' AND c.sale_mode <> 'run' AND s.held + s.confirmed < s.capacity
    AND (c.handicap_max IS NULL OR g.handicap <= c.handicap_max)
    AND NOT EXISTS (SELECT 1 FROM places p WHERE p.academy_id = s.academy_id
      AND p.session_id = s.id AND p.golfer_id = g.id AND p.state <> 'cancelled')`

/** The rows of a hold: what was agreed to, the enrolment and its place. */
export const INSERT_HOLD = `
  WITH consent AS (
    INSERT INTO consents (academy_id, id, golfer_id, kind, wording, given_by, given_at)
    VALUES ($1, $2, $3, 'waiver', $4, $5, now())
  ), enrolment AS (
    INSERT INTO enrolments (academy_id, id, clinic_id, golfer_id, taken_by, kind, state,
      is_offer, held_until, currency, net_minor, tax_minor, pay_mode, created_at)
    VALUES ($1, $6, $7, $3, $5, 'session', 'held', false, $8, $9, $10, $11, 'card', now()))
  INSERT INTO places (academy_id, id, enrolment_id, session_id, golfer_id, state, net_minor,
    tax_minor)
  VALUES ($1, $12, $6, $13, $3, 'held', $10, $11)`

/** The guard: one seat, where there is one. */
export const TAKE_SEAT = `
  UPDATE sessions SET held = held + 1
  WHERE academy_id = $1 AND id = $2 AND state = 'planned' AND held + confirmed < capacity`
