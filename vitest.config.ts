import { defineConfig } from 'vitest/config'

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          include: [
            'packages/**/*.test.ts',
            'apps/**/*.test.{ts,tsx}',
            'tests/{architecture,reference,fakes}/**/*.test.ts',
          ],
          // Long enough for a machine that does other work meanwhile; nothing here measures time.
          testTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'api',
          include: ['tests/{api,tenancy}/**/*.test.ts'],
          exclude: ['**/*-unguarded.test.ts'],
          globalSetup: ['tests/support/template.ts'],
          // Each file makes a world of its own, so that the product need be loaded only once.
          isolate: false,
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'api-unguarded',
          // These put something in place of a module, so that they load the product for themselves.
          include: ['tests/api/**/*-unguarded.test.ts'],
          globalSetup: ['tests/support/template.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
})
