import { ESLint } from 'eslint'
import tseslint from 'typescript-eslint'
import { describe, expect, it } from 'vitest'
import { boundaries } from '../../infra/lint-boundaries.mjs'

/** The boundaries alone, without the rules that need types: quick enough for every run. */
const eslint = new ESLint({
  overrideConfigFile: true,
  overrideConfig: [
    {
      files: ['**/*.{ts,tsx}'],
      languageOptions: { parser: tseslint.parser },
      plugins: { '@typescript-eslint': tseslint.plugin },
      // Other rules are switched off here, so what is said about them means nothing.
      linterOptions: { reportUnusedDisableDirectives: 'off' },
    },
    ...boundaries,
  ],
})

const UPWARDS = 'Features import downwards only.'
const DATABASE = 'Only queries.ts and models.ts touch the database libraries.'
const VENDOR = 'Only an adapter touches a vendor.'
const CLOCK = 'Only platform/clock.ts reads the clock; use services.clock.'
const PURE = 'This package is pure: no input, no output, no clock.'
const COMPONENT = 'A component knows no domain, router or query.'
const COMPOSED = 'Features import downwards only; a page composes them.'
const CONTRACT = 'The web knows the API by its contract only.'

/** What the rules say of a text, were it in that file. */
async function saidOf(file: string, text: string): Promise<string[]> {
  const [result] = await eslint.lintText(text, { filePath: file })
  return (result?.messages ?? []).map(({ message }) => message)
}

describe('the boundaries', () => {
  it('hold everywhere', { timeout: 120_000 }, async () => {
    const results = await eslint.lintFiles(['apps/**/*.{ts,tsx}', 'packages/**/*.ts'])
    const broken = results
      .filter(({ messages }) =>
        messages.some(({ ruleId, fatal }) => fatal ?? ruleId?.includes('restricted')),
      )
      .map(({ filePath, messages }) => [filePath, messages.map(({ message }) => message)])
    expect(broken).toEqual([])
    expect(results.length).toBeGreaterThan(150)
  })
})

describe('a planted violation', () => {
  const api = 'apps/api/src'
  const web = 'apps/web/src'
  it.each([
    ['a lower feature knows a higher', 'venues/rules.ts', '../clinics/clinics', UPWARDS],
    ['accounts know academies', 'accounts/accounts.ts', '../academies/academies', UPWARDS],
    ['the register knows the coaching', 'register/register.ts', '../coaching/coaching', UPWARDS],
    ['coaching knows the checkout', 'coaching/compare.ts', '../checkout/orders', UPWARDS],
    ['coaching touches the library', 'coaching/compare.ts', 'objection', DATABASE],
    ['checkout knows the mail', 'checkout/orders.ts', '../messaging/messaging', UPWARDS],
    ['a query knows a higher feature', 'clinics/queries.ts', '../checkout/queries', UPWARDS],
    ['… and from a folder inside', 'messaging/mail/places.ts', '../../demo/load', UPWARDS],
    [
      'the platform knows a feature',
      'platform/ids.ts',
      '../clinics/clinics',
      'The platform knows no feature.',
    ],
    [
      '… and from a folder inside',
      'platform/http/router.ts',
      '../../accounts/accounts',
      'The platform knows no feature.',
    ],
    [
      'the ledger knows a feature',
      'ledger/ledger.ts',
      '../checkout/orders',
      'The ledger knows no feature.',
    ],
    ['a use case touches the database library', 'clinics/clinics.ts', 'knex', DATABASE],
    ['a rule touches the driver', 'clinics/rules.ts', 'pg', DATABASE],
    ['a use case touches a vendor', 'checkout/orders.ts', 'stripe', VENDOR],
    ['a letter touches a vendor', 'messaging/mail/places.ts', '@sendgrid/mail', VENDOR],
  ])('is seen: %s', async (_, file, source, sentence) => {
    const said = await saidOf(`${api}/${file}`, `import { x } from '${source}'\nx()\n`)
    expect(said.join('\n')).toContain(sentence)
  })

  it.each([
    ['money reads a file', 'packages/money/src/tax.ts', 'node:fs', PURE],
    ['the swing reads a file', 'packages/swing/src/wrist.ts', 'node:fs', PURE],
    [
      'the schedule knows an app',
      'packages/schedule/src/sun.ts',
      '../../../apps/api/src/app',
      PURE,
    ],
    ['a component knows the router', `${web}/ui/button.tsx`, 'react-router', COMPONENT],
    ['a component knows a feature', `${web}/ui/button.tsx`, '../clinics/queries', COMPONENT],
    ['a lower part knows a higher', `${web}/venues/parts.tsx`, '../checkout/queries', COMPOSED],
    ['a part knows the API', `${web}/clinics/parts.tsx`, '../../../api/src/app', CONTRACT],
    ['a page knows the API', `${web}/clinics/clinic.page.tsx`, '../../../api/src/app', CONTRACT],
    ['the web knows a stand-in', `${web}/main.tsx`, '@marram/fakes', CONTRACT],
    [
      'the contract knows an app',
      'packages/contract/src/routes.ts',
      '../../../apps/api/src/app',
      'A package imports no app.',
    ],
  ])('is seen: %s', async (_, file, source, sentence) => {
    const said = await saidOf(file, `import { x } from '${source}'\nx()\n`)
    expect(said.join('\n')).toContain(sentence)
  })

  it.each([
    ['Date.now()', CLOCK],
    ['new Date()', CLOCK],
    ['rows.upsertGraph({})', 'Graph writes delete what they were not given'],
  ])('is seen: %s in a use case', async (code, sentence) => {
    const said = await saidOf(`${api}/checkout/orders.ts`, `export const x = ${code}\n`)
    expect(said.join('\n')).toContain(sentence)
  })

  it.each([
    [
      'a higher feature knows a lower',
      'checkout/orders.ts',
      `import { x } from '../clinics/clinics'`,
    ],
    ['a query file knows the library', 'clinics/queries.ts', `import { x } from 'objection'`],
    ['a type is not the library', 'clinics/clinics.ts', `import type { x } from 'knex'`],
    ['an adapter knows its vendor', 'checkout/stripe-provider.ts', `import { x } from 'stripe'`],
    ['a day of its own', 'checkout/orders.ts', `export const x = new Date(0)`],
  ])('is not seen where there is none: %s', async (_, file, text) => {
    expect(await saidOf(`${api}/${file}`, `${text}\n`)).toEqual([])
  })
})
