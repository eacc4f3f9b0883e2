import type { Answer } from '@marram/contract'
import { isoInstant as iso } from '../platform/db/iso-instant'
import { ask, type Question } from '../platform/tenancy/ask'
import type { AcademyTrx } from '../platform/tenancy/transaction'

type EnrolmentView = Answer<'enrolments.read'>

/** Whose enrolments are wanted. */
export type WantedViews =
  { id: string } | { accountId: string } | { clinicId: string } | { golferId: string }

export interface OrderInView {
  state: 'open' | 'paid' | 'void'
  method: 'card' | 'desk'
  lastRefusal: string | null
  totalMinor: number
  paidMinor: number
  owedMinor: number
}

/** An enrolment as it is shown; what is said of its payment follows from its orders. */
export type ViewRow = Omit<EnrolmentView, 'payment' | 'owedMinor'> & { orders: OrderInView[] }

const WHERE = {
  id: 'e.id = $1',
  accountId: '(g.account_id = $1 OR g.guardian_account_id = $1)',
  clinicId: 'e.clinic_id = $1',
  golferId: 'e.golfer_id = $1',
}

/** Enrolments with all that is shown of them, the newest first, in one question. */
export async function readViews(trx: AcademyTrx, by: WantedViews): Promise<ViewRow[]> {
  const rows = await ask<{ view: ViewRow }>(trx, questionOf(by))
  return rows.map(({ view }) => view)
}

export function questionOf(by: WantedViews): Question {
  // Each kind of wish has exactly one key.
  const [kind, value] = Object.entries(by)[0] as [keyof typeof WHERE, string]
  return {
    name: `enrolment-views-by-${kind}`,
    text: `${VIEW} WHERE ${WHERE[kind]} ORDER BY e.created_at DESC, e.id DESC`,
    values: [value],
  }
}

const AREAS = `
  SELECT coalesce(json_agg(a.name ORDER BY sa.position), '[]') FROM session_areas sa
    JOIN areas a ON a.academy_id = sa.academy_id AND a.id = sa.area_id
  WHERE sa.academy_id = p.academy_id AND sa.session_id = p.session_id`

const PLACES = `
  SELECT coalesce(json_agg(json_build_object(
    'id', p.id, 'sessionId', p.session_id, 'number', s.number,
    'startsAt', ${iso('s.starts_at')}, 'endsAt', ${iso('s.ends_at')}, 'state', p.state,
    'isCalledOff', s.state = 'called-off',
    'owed', CASE WHEN o.place_id IS NOT NULL THEN json_build_object(
      'amountMinor', o.amount_minor, 'choice', o.choice, 'chooseBy', ${iso('o.choose_by')},
      'isSettled', o.settled_at IS NOT NULL) END,
    'mark', m.mark, 'areas', (${AREAS})) ORDER BY s.number), '[]')
  FROM places p
    JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
    LEFT JOIN marks m ON m.academy_id = p.academy_id AND m.place_id = p.id
    LEFT JOIN owed_places o ON o.academy_id = p.academy_id AND o.place_id = p.id
  WHERE p.academy_id = e.academy_id AND p.enrolment_id = e.id`

/** What of an order is still to be paid at the desk; 0 for one that is paid by card. */
export async function readOwedAtDesk(trx: AcademyTrx, orderId: string): Promise<number> {
  const [row] = await ask<{ owedMinor: number }>(trx, {
    name: 'owed-at-desk',
    text: 'SELECT owed_minor AS "owedMinor" FROM owed_at_desk WHERE order_id = $1',
    values: [orderId],
  })
  return row?.owedMinor ?? 0
}

const ORDERS = `
  SELECT coalesce(json_agg(json_build_object(
    'state', r.state, 'lastRefusal', r.last_refusal, 'totalMinor', r.net_minor + r.tax_minor,
    'owedMinor', coalesce((SELECT d.owed_minor FROM owed_at_desk d
      WHERE d.academy_id = r.academy_id AND d.order_id = r.id), 0),
    'paidMinor', (SELECT coalesce(sum(y.amount_minor), 0) FROM payments y
      WHERE y.academy_id = r.academy_id AND y.order_id = r.id)) ORDER BY r.created_at), '[]')
  FROM orders r WHERE r.academy_id = e.academy_id AND r.enrolment_id = e.id`

const VIEW = `
  SELECT json_build_object(
    'id', e.id, 'kind', e.kind, 'state', e.state, 'endedBecause', e.ended_because,
    'isOffer', e.is_offer, 'heldUntil', ${iso('e.held_until')},
    'clinic', json_build_object('id', c.id, 'slug', c.slug, 'title', c.title, 'zone', c.zone,
      'bring', c.bring, 'venueName', v.name),
    'golfer', json_build_object('id', g.id, 'name', g.name, 'isMe', g.account_id IS NOT NULL),
    'netMinor', e.net_minor, 'taxMinor', e.tax_minor, 'totalMinor', e.net_minor + e.tax_minor,
    'payMode', e.pay_mode, 'orders', (${ORDERS}), 'places', (${PLACES})) AS view
  FROM enrolments e
    JOIN clinics c ON c.academy_id = e.academy_id AND c.id = e.clinic_id
    JOIN golfers g ON g.academy_id = e.academy_id AND g.id = e.golfer_id
    JOIN venues v ON v.academy_id = c.academy_id AND v.id = c.venue_id`
