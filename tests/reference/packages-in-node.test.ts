import { execFileSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'

/** What a text prints in a process of Node alone, which loads scripts as no bundler does. */
function printedBy(text: string): string {
  const options = ['--import', 'tsx', '--input-type=module', '--eval', text]
  return execFileSync(process.execPath, options, { encoding: 'utf8' }).trim()
}

describe('in Node itself, without what tests and bundlers add', () => {
  it('the swing finds its statistics', () => {
    const text = `
      import { changeOf } from '@marram/swing'
      const of = { valuesDeg: [1, 2, 3], errorDeg: 0.1 }
      const against = { valuesDeg: [4, 5, 6], errorDeg: 0.1 }
      console.log(changeOf({ of, against }).leastDeg.toFixed(3))`
    // [D] t(0.975, 4)·√(1/3 + 1/3) = 2.776·0.8165.
    expect(printedBy(text)).toBe('2.267')
  })

  it('the contract loads what it is made of', () => {
    const text = `
      import { SCHEMAS } from '@marram/contract'
      console.log(Object.keys(SCHEMAS).includes('swings.record'))`
    expect(printedBy(text)).toBe('true')
  })
})
