import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { ACCENTS } from './accents'

const tokens = readFileSync('apps/web/src/styles/tokens.css', 'utf8')
const [light = '', dusk = ''] = tokens.split("[data-theme='dusk']")

describe('the accents', () => {
  it.each(ACCENTS)('$name can be read in both lights', ({ accent, accentDusk }) => {
    for (const ground of ['sand', 'paper']) {
      expect(contrast(accent, token(light, ground))).toBeGreaterThanOrEqual(4.5)
      expect(contrast(accentDusk, token(dusk, ground))).toBeGreaterThanOrEqual(4.5)
    }
  })

  it('are measured as WCAG 2.2 measures', () => {
    // Black on white is 21 to 1 by definition.
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10)
  })
})

function token(css: string, name: string): string {
  const found = new RegExp(`--color-${name}: (#[0-9a-f]{6})`).exec(css)?.[1]
  if (!found) throw new Error(`No token ${name}.`)
  return found
}

/** WCAG 2.2, "contrast ratio" and "relative luminance". */
function contrast(one: string, other: string): number {
  const [lighter = 0, darker = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a)
  return (lighter + 0.05) / (darker + 0.05)
}

function luminance(colour: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const channel = parseInt(colour.slice(at, at + 2), 16) / 255
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4
  })
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}
