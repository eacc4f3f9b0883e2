import { defineConfig } from 'vitest/config'

export default defineConfig({
  test: {
    include: ['packages/**/*.test.ts', 'apps/**/*.test.{ts,tsx}', 'tests/{architecture,reference}/**/*.test.ts'],
    environment: 'node',
  },
})
