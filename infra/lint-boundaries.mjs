/**
 * Who may import whom. Features of the API import downwards only, in the order of this list; the
 * packages import no app; only query files touch the database libraries; only adapters a vendor.
 */
const FEATURES_UPWARDS = [
  ['accounts'],
  ['academies'],
  ['venues', 'coaches', 'golfers'],
  ['clinics'],
  ['enrolments'],
  ['register'],
  ['coaching'],
  ['checkout'],
  ['messaging'],
  ['demo'],
]

const VENDORS = ['stripe', '@sendgrid/mail', '@sendgrid/client', '@sendgrid/eventwebhook']
const DATABASE = ['knex', 'objection', 'pg']

const pattern = (group, message) => ({ group, message })

function rule(files, patterns, ignores = []) {
  return {
    files,
    ignores,
    rules: {
      '@typescript-eslint/no-restricted-imports': ['error', { patterns }],
    },
  }
}

const vendorRule = pattern(VENDORS, 'Only an adapter touches a vendor.')
const databaseRule = {
  group: DATABASE,
  allowTypeImports: true,
  message: 'Only queries.ts and models.ts touch the database libraries.',
}

/** Feature folders above a feature, which it must not import. `ledger` stands below all but platform. */
function above(level) {
  return FEATURES_UPWARDS.slice(level + 1)
    .flat()
    .flatMap((name) => [`../${name}/**`, `../../${name}/**`])
}

/** Files that touch the database or a vendor; like all others they import downwards only. */
const AT_THE_EDGE = [
  '**/*-queries.ts',
  '**/queries.ts',
  '**/models.ts',
  '**/*-provider.ts',
  '**/webhooks.ts',
  '**/*.test.ts',
]

// Where two rules fit a file the later counts, so it repeats what the earlier says.
const perFeature = FEATURES_UPWARDS.flatMap((names, level) =>
  names.flatMap((name) => {
    const files = [`apps/api/src/${name}/**/*.ts`]
    const forbidden = above(level)
    const upwards =
      forbidden.length > 0 ? [pattern(forbidden, 'Features import downwards only.')] : []
    return [
      ...(upwards.length > 0 ? [rule(files, upwards)] : []),
      rule(files, [vendorRule, databaseRule, ...upwards], AT_THE_EDGE),
    ]
  }),
)

const webRule = pattern(
  ['**/api/src/**', '@marram/fakes'],
  'The web knows the API by its contract only.',
)

/** The web's features import downwards too; only a page may reach upwards, to compose. */
const perWebFeature = FEATURES_UPWARDS.flatMap((names, level) =>
  names.map((name) => {
    const forbidden = above(level)
    if (forbidden.length === 0) return {}
    return rule(
      [`apps/web/src/${name}/**/*.{ts,tsx}`],
      [webRule, pattern(forbidden, 'Features import downwards only; a page composes them.')],
      ['**/*.page.tsx', '**/*.test.ts'],
    )
  }),
)

export const boundaries = [
  rule(['packages/**/*.ts'], [pattern(['**/apps/**'], 'A package imports no app.')]),
  rule(
    ['packages/{money,schedule,swing}/src/**/*.ts'],
    [pattern(['node:*', '**/apps/**'], 'This package is pure: no input, no output, no clock.')],
    ['**/*.test.ts'],
  ),
  rule(
    ['apps/api/src/ledger/**/*.ts'],
    [
      pattern(
        FEATURES_UPWARDS.flat().map((name) => `../${name}/**`),
        'The ledger knows no feature.',
      ),
      vendorRule,
    ],
  ),
  rule(
    ['apps/api/src/ledger/**/*.ts'],
    [
      pattern(
        FEATURES_UPWARDS.flat().map((name) => `../${name}/**`),
        'The ledger knows no feature.',
      ),
      vendorRule,
      databaseRule,
    ],
    AT_THE_EDGE,
  ),
  rule(
    ['apps/api/src/platform/**/*.ts'],
    [
      pattern(
        [...FEATURES_UPWARDS.flat(), 'ledger'].flatMap((name) => [
          `../${name}/**`,
          `../../${name}/**`,
        ]),
        'The platform knows no feature.',
      ),
    ],
  ),
  ...perFeature,
  rule(['apps/web/src/**/*.{ts,tsx}'], [webRule]),
  ...perWebFeature,
  rule(
    ['apps/web/src/ui/**/*.{ts,tsx}'],
    [
      pattern(
        ['../*', 'react-router', '@tanstack/*', '@marram/*'],
        'A component knows no domain, router or query.',
      ),
    ],
  ),
  {
    files: ['apps/api/src/**/*.ts', 'packages/{money,schedule,swing}/src/**/*.ts'],
    ignores: ['apps/api/src/platform/clock.ts', '**/*.test.ts'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']",
          message: 'Only platform/clock.ts reads the clock; use services.clock.',
        },
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'Only platform/clock.ts reads the clock; use services.clock.',
        },
        {
          selector:
            'CallExpression[callee.property.name=/^(upsertGraph|allowGraph|insertGraphAndFetch)/]',
          message: 'Graph writes delete what they were not given; write rows one kind at a time.',
        },
      ],
    },
  },
]
