import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import {
  expandInstants,
  expandLocal,
  formatRecurrence,
  parseRecurrence,
  WEEKDAYS,
  type Recurrence,
} from '@marram/schedule'

/**
 * Rules made at random, expanded by us and by python-dateutil (Debian: python3-dateutil). A few
 * hundred by default; several thousand with MARRAM_DEEP=1.
 */
const RULE_COUNT = process.env['MARRAM_DEEP'] === '1' ? 6_000 : 300
const SEED = 20_260_406
const SCRIPT = fileURLToPath(new URL('./dateutil-expand.py', import.meta.url))
// The python first on PATH may be one of its own, without Debian's packages.
const PYTHON = existsSync('/usr/bin/python3') ? '/usr/bin/python3' : 'python3'
const hasDateutil = spawnSync(PYTHON, ['-c', 'import dateutil, zoneinfo']).status === 0

const ZONES = [
  ...['Europe/Dublin', 'Europe/London', 'America/Denver', 'America/Phoenix', 'Australia/Sydney'],
  ...['America/St_Johns', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'America/Santiago'],
]

interface Case {
  rule: Recurrence
  startsOnLocal: string
  startsAtLocal: string
  zone: string
}

/** Numbers that look random and are the same each time: a 32-bit xorshift (Marsaglia 2003). */
function makeRandom(seed: number): (below: number) => number {
  let state = seed
  return (below) => {
    state ^= state << 13
    state ^= state >>> 17
    state ^= state << 5
    return (state >>> 0) % below
  }
}

function makeCases(count: number): Case[] {
  const random = makeRandom(SEED)
  const pick = <T>(items: readonly T[]): T => {
    const item = items[random(items.length)]
    if (item === undefined) throw new Error('There is nothing to pick from')
    return item
  }
  const some = <T>(items: readonly T[], most: number): T[] => [
    ...new Set(Array.from({ length: 1 + random(most) }, () => pick(items))),
  ]
  const monthDays = [1, 2, 5, 13, 15, 28, 29, 30, 31, -1, -2, -7, -31]
  const positions = [1, 2, 3, 4, 5, -1, -2, -3]

  const makeRule = (): Omit<Recurrence, 'ends' | 'interval' | 'weekStart'> => {
    const days = some(WEEKDAYS, 5).map((weekday) => ({ weekday, nth: null }))
    const plain = { byDay: [], bySetPos: [], byMonthDay: [] }
    switch (random(10)) {
      case 0:
        return { ...plain, freq: 'daily' }
      case 1:
        return { ...plain, freq: 'daily', byDay: days }
      case 2:
        return { ...plain, freq: 'weekly' }
      case 3:
      case 4:
        return { ...plain, freq: 'weekly', byDay: days }
      case 5:
        return { ...plain, freq: 'monthly', byMonthDay: some(monthDays, 4) }
      case 6:
        return { ...plain, freq: 'monthly', byDay: days, bySetPos: some(positions, 3) }
      case 7: {
        const nth = pick([1, 2, 3, 4, 5, -1, -2, -5])
        return { ...plain, freq: 'monthly', byDay: days.map((day) => ({ ...day, nth })) }
      }
      case 8: {
        const byDay = days.map((day) => ({ ...day, nth: pick([1, 2, 5, -1, -2, -5]) }))
        return { ...plain, freq: 'monthly', byDay, byMonthDay: some(monthDays, 4) }
      }
      default:
        return { ...plain, freq: 'monthly', byDay: days, byMonthDay: some(monthDays, 3) }
    }
  }
  return Array.from({ length: count }, () => {
    const startMs = Date.UTC(2024, 0, 1) + random(4 * 366) * 86_400_000
    // Nights more often than chance would, since that is when clocks change.
    const hour = pick([0, 1, 1, 2, 2, 3, 7, 18, 23])
    const rule = makeRule()
    const untilMs = startMs + random(rule.freq === 'daily' ? 300 : 500) * 86_400_000
    const untilDay = new Date(untilMs).toISOString().slice(0, 10)
    const untilLocal = pick([untilDay, `${untilDay}T02:30`])
    return {
      rule: {
        ...rule,
        interval: pick([1, 1, 1, 2, 2, 3, 4, 7]),
        weekStart: pick(['MO', 'MO', 'SU', 'WE'] as const),
        ends:
          random(3) > 0 ? { kind: 'count', count: 1 + random(30) } : { kind: 'until', untilLocal },
      },
      startsOnLocal: new Date(startMs).toISOString().slice(0, 10),
      startsAtLocal: `${String(hour).padStart(2, '0')}:${pick(['00', '30', '45'])}`,
      zone: pick(ZONES),
    }
  })
}

function expandWithDateutil(cases: readonly Case[]): [string, number][][] {
  const input = cases.map(({ rule, startsOnLocal, startsAtLocal, zone }) => ({
    // A last day is included wholly; dateutil takes it for its first second.
    rule: formatRecurrence(rule).replace(/(UNTIL=\d{8})(?=;|$)/, '$1T235959'),
    start: `${startsOnLocal}T${startsAtLocal}`,
    zone,
    limit: 401,
  }))
  const run = spawnSync(PYTHON, [SCRIPT], {
    input: JSON.stringify(input),
    encoding: 'utf8',
    maxBuffer: 256 * 1024 * 1024,
  })
  if (run.status !== 0) throw new Error(run.stderr)
  // The script states this shape, and the comparison fails on any other.
  return JSON.parse(run.stdout) as [string, number][][]
}

describe.skipIf(!hasDateutil)('recurrence, against python-dateutil (python3-dateutil)', () => {
  it(`gives the same dates and instants for ${RULE_COUNT} rules`, { timeout: 300_000 }, () => {
    const cases = makeCases(RULE_COUNT)
    const expected = expandWithDateutil(cases)
    expect(expected.length).toBe(RULE_COUNT)
    let dateCount = 0
    cases.forEach((one, index) => {
      const text = formatRecurrence(one.rule)
      const label = `${text} from ${one.startsOnLocal} ${one.startsAtLocal} in ${one.zone}`
      expect(parseRecurrence(text), label).toEqual({ ok: true, rule: one.rule })
      const theirs = expected[index] ?? []
      dateCount += theirs.length
      expect(expandLocal(one), label).toEqual(theirs.map(([local]) => local))
      const instants = expandInstants({ ...one, durationMinutes: 60 }).map(
        ({ startsAt }) => startsAt.valueOf() / 1000,
      )
      expect(instants, label).toEqual(theirs.map(([, seconds]) => seconds))
    })
    // Rules that gave nothing would agree on nothing.
    expect(dateCount).toBeGreaterThan(RULE_COUNT * 5)
  })
})
