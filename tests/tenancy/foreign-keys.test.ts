import { afterAll, beforeAll, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { takeDatabase, type TestDatabase } from '../support/database'
import { listForeignKeys, type ForeignKey } from './catalogue-queries'

/** Rows that are a part of another and go with it. Everything not named here holds its parent. */
const GO_WITH_THEIR_PARENT = [
  'clinic_areas (clinic_id) → clinics',
  'clinic_coaches (clinic_id) → clinics',
  'clinics (academy_id) → academies',
  'coaches (academy_id) → academies',
  'coaching_settings (academy_id) → academies',
  'consents (golfer_id) → golfers',
  'golfers (academy_id) → academies',
  'invitations (academy_id) → academies',
  'invitations (coach_id) → coaches',
  'mails (academy_id) → academies',
  'mark_history (place_id) → places',
  'marks (place_id) → places',
  'marks (session_id) → sessions',
  'memberships (academy_id) → academies',
  'memberships (account_id) → accounts',
  'minor_look_ups (golfer_id) → golfers',
  'places (enrolment_id) → enrolments',
  'session_areas (session_id) → sessions',
  'session_coaches (session_id) → sessions',
  'sessions (clinic_id) → clinics',
  'swing_targets (golfer_id) → golfers',
  'swings (golfer_id) → golfers',
  'venues (academy_id) → academies',
  'waitlist_entries (account_id) → accounts',
  'waitlist_entries (clinic_id) → clinics',
  'waitlist_entries (golfer_id) → golfers',
  'waitlist_entries (session_id) → sessions',
]

/** Rows that stay, and forget who or what it was. */
const FORGET_THEIR_PARENT = [
  'coaches (account_id) → accounts',
  'coaching_settings (changed_by) → accounts',
  'enrolments (taken_by) → accounts',
  'golfers (account_id) → accounts',
  'golfers (guardian_account_id) → accounts',
  'invitations (invited_by) → accounts',
  'orders (account_id) → accounts',
  'payments (taken_by) → accounts',
  'sessions (register_closed_by) → accounts',
  'swing_targets (set_by) → accounts',
  'swings (recorded_by) → accounts',
  'swings (removed_by) → accounts',
  'swings (session_id) → sessions',
  'waitlist_entries (enrolment_id) → enrolments',
]

let database: TestDatabase
let keys: ForeignKey[]

beforeAll(async () => {
  database = await takeDatabase()
  const db = connect({ url: database.superuserUrl, poolSize: 1, name: 'tests' })
  keys = await listForeignKeys(db)
  await db.destroy()
})
afterAll(() => database.drop())

const say = ({ from, columns, to }: ForeignKey) =>
  `${from} (${columns.replace('academy_id, ', '')}) → ${to}`
const thatOnDelete = (action: string) => keys.filter(({ onDelete }) => onDelete === action)

it('states for every foreign key what becomes of the row', () => {
  expect(thatOnDelete('no action').map(say)).toEqual([])
  expect(thatOnDelete('set default').map(say)).toEqual([])
  expect(thatOnDelete('cascade').map(say).sort()).toEqual(GO_WITH_THEIR_PARENT)
  expect(thatOnDelete('set null').map(say).sort()).toEqual(FORGET_THEIR_PARENT)
  expect(thatOnDelete('restrict').length).toBeGreaterThan(20)
})

it('never empties the academy of a row whose parent goes', () => {
  const emptied = thatOnDelete('set null').map((key) => key.emptied)
  expect(emptied.filter((columns) => columns.includes('academy_id'))).toEqual([])
})

it('never lets money or what was recorded of it go with anything', () => {
  const money = ['transfers', 'entries', 'orders', 'payments', 'refunds', 'credit_changes']
  const cascading = thatOnDelete('cascade').filter(({ from }) => money.includes(from))
  expect(cascading.map(say)).toEqual([])
})
