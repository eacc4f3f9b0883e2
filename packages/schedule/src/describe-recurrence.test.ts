import { describe, expect, it } from 'vitest'
import { describeRecurrence } from './describe-recurrence'
import { parseRecurrence } from './parse-recurrence'

function wordsFor(text: string, startsOnLocal?: string): string {
  const parsed = parseRecurrence(`${text};COUNT=8`)
  if (!parsed.ok) throw new Error(parsed.sentence)
  return describeRecurrence(parsed.rule, startsOnLocal === undefined ? {} : { startsOnLocal })
}

describe('describeRecurrence', () => {
  it.each([
    ['FREQ=DAILY', 'Every day'],
    ['FREQ=DAILY;INTERVAL=2', 'Every second day'],
    ['FREQ=DAILY;BYDAY=MO,TU,WE,TH,FR', 'Every weekday'],
    ['FREQ=DAILY;INTERVAL=3;BYDAY=SU,SA', 'Every third day, when it is a Saturday or Sunday'],
    ['FREQ=WEEKLY', 'Every week'],
    ['FREQ=WEEKLY;INTERVAL=2', 'Every second week'],
    ['FREQ=WEEKLY;BYDAY=TU', 'Every Tuesday'],
    ['FREQ=WEEKLY;BYDAY=SU,TU', 'Every Tuesday and Sunday'],
    ['FREQ=WEEKLY;BYDAY=MO,WE,FR', 'Every Monday, Wednesday and Friday'],
    ['FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,SU', 'Every second Tuesday and Sunday'],
    ['FREQ=WEEKLY;INTERVAL=13;BYDAY=TU', 'Every 13th Tuesday'],
    ['FREQ=WEEKLY;BYDAY=FR,TH,WE,TU,MO', 'Every weekday'],
    ['FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TU,WE,TH,FR', 'Every weekday of every second week'],
    ['FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR,SA,SU', 'Every day'],
    ['FREQ=WEEKLY;INTERVAL=3;BYDAY=MO,TU,WE,TH,FR,SA,SU', 'Every day of every third week'],
    ['FREQ=MONTHLY', 'Every month'],
    ['FREQ=MONTHLY;INTERVAL=3', 'Every third month'],
    ['FREQ=MONTHLY;BYDAY=TU', 'Every Tuesday'],
    ['FREQ=MONTHLY;INTERVAL=2;BYDAY=TU', 'Every Tuesday of every second month'],
    ['FREQ=MONTHLY;BYDAY=2TU', 'The second Tuesday of the month'],
    ['FREQ=MONTHLY;BYDAY=1TU,-1FR', 'The first Tuesday and last Friday of the month'],
    ['FREQ=MONTHLY;BYMONTHDAY=15,30', 'The 15th and 30th of the month'],
    [
      'FREQ=MONTHLY;BYMONTHDAY=1,2,3,11,21,22',
      'The 1st, 2nd, 3rd, 11th, 21st and 22nd of the month',
    ],
    ['FREQ=MONTHLY;BYMONTHDAY=-1', 'The last day of the month'],
    ['FREQ=MONTHLY;BYMONTHDAY=-2,1', 'The 1st and last but one day of the month'],
    ['FREQ=MONTHLY;BYMONTHDAY=-12', 'The 12th from last day of the month'],
    ['FREQ=MONTHLY;BYMONTHDAY=13;BYDAY=FR', 'The 13th of the month, when it is a Friday'],
    ['FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2', 'The last but one weekday of the month'],
    [
      'FREQ=MONTHLY;BYDAY=TU,WE,TH;BYSETPOS=3',
      'The third Tuesday, Wednesday or Thursday of the month',
    ],
    ['FREQ=MONTHLY;BYDAY=SA;BYSETPOS=1,-1', 'The first and last Saturday of the month'],
  ])('says %s as "%s"', (text, words) => {
    expect(wordsFor(text)).toBe(words)
  })

  it('names the day of the start where the rule names none', () => {
    expect(wordsFor('FREQ=WEEKLY', '2026-10-06')).toBe('Every Tuesday')
    expect(wordsFor('FREQ=WEEKLY;INTERVAL=2', '2026-10-11')).toBe('Every second Sunday')
    expect(wordsFor('FREQ=MONTHLY', '2026-10-06')).toBe('The 6th of the month')
  })
})
