import { describe, expect, it } from 'vitest'
import { dayCodeOf, ruleOf, wordsOfRule, type RuleWords } from './rule-words'

const saved = (rrule: string) => ({
  rrule,
  startsOnLocal: '2026-09-15',
  zone: 'America/Denver',
  recurrence: '',
})

/** The words of a saved rule with some of them changed. */
function changed(rrule: string, change: Partial<RuleWords>): string {
  const words = wordsOfRule(saved(rrule))
  if (!words) throw new Error('The rule has no words.')
  return ruleOf({ ...words, ...change }, saved(rrule))
}

describe('a saved rule', () => {
  it.each([
    'FREQ=WEEKLY;BYDAY=TU;COUNT=8',
    'FREQ=WEEKLY;INTERVAL=3;BYDAY=TU,TH;COUNT=8',
    'FREQ=WEEKLY;COUNT=8',
    'FREQ=WEEKLY;BYDAY=TU;UNTIL=20261020',
    'FREQ=WEEKLY;BYDAY=TU;UNTIL=20261021T010000Z',
    'FREQ=WEEKLY;INTERVAL=1;WKST=SU;BYDAY=TU;COUNT=8',
  ])('comes back as it was when no word is changed: %s', (rrule) => {
    expect(changed(rrule, {})).toBe(rrule)
  })

  it.each([
    'FREQ=MONTHLY;BYDAY=2TU;COUNT=6',
    'FREQ=DAILY;COUNT=5',
    'FREQ=MONTHLY;BYMONTHDAY=1;COUNT=6',
  ])('has no words when it is not weekly, and stays whatever they say: %s', (rrule) => {
    expect(wordsOfRule(saved(rrule))).toBeNull()
    const words = { interval: '2', weekdays: ['MO'], sessions: '4', lastDay: '' }
    expect(ruleOf(words, saved(rrule))).toBe(rrule)
  })

  it('changes only in the part whose word is another', () => {
    const rrule = 'FREQ=WEEKLY;INTERVAL=3;WKST=SU;BYDAY=TU;COUNT=8'
    expect(changed(rrule, { sessions: '6' })).toBe(
      'FREQ=WEEKLY;INTERVAL=3;WKST=SU;BYDAY=TU;COUNT=6',
    )
    expect(changed(rrule, { interval: '1' })).toBe('FREQ=WEEKLY;WKST=SU;BYDAY=TU;COUNT=8')
    expect(changed(rrule, { weekdays: ['TU', 'TH'] })).toBe(
      'FREQ=WEEKLY;INTERVAL=3;WKST=SU;BYDAY=TU,TH;COUNT=8',
    )
  })

  it('says its last day as the venue has it, and goes on until another one', () => {
    // One in the morning in UTC is the evening before in Denver.
    const rrule = 'FREQ=WEEKLY;BYDAY=TU;UNTIL=20261021T010000Z'
    expect(wordsOfRule(saved(rrule))).toMatchObject({ sessions: '', lastDay: '2026-10-20' })
    expect(changed(rrule, { lastDay: '2026-10-27' })).toBe('FREQ=WEEKLY;BYDAY=TU;UNTIL=20261027')
  })

  it('takes its day from the first date where it names none', () => {
    expect(wordsOfRule(saved('FREQ=WEEKLY;COUNT=8'))?.weekdays).toEqual(['TU'])
    expect(dayCodeOf('2026-09-20')).toBe('SU')
  })
})

describe('a new rule', () => {
  it('is weekly', () => {
    const words = { interval: '1', weekdays: ['TU', 'TH'], sessions: '8', lastDay: '' }
    expect(ruleOf(words, null)).toBe('FREQ=WEEKLY;BYDAY=TU,TH;COUNT=8')
    expect(ruleOf({ ...words, interval: '2' }, null)).toBe(
      'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,TH;COUNT=8',
    )
  })
})
