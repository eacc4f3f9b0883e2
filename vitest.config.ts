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
        },
      },
      {
        test: {
          name: 'api',
          include: ['tests/{api,tenancy}/**/*.test.ts'],
          globalSetup: ['tests/support/template.ts'],
          testTimeout: 30_000,
          hookTimeout: 30_000,
        },
      },
    ],
  },
})
