import reactHooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'
import { boundaries } from './infra/lint-boundaries.mjs'

export default tseslint.config(
  {
    ignores: [
      'dist/**',
      '.marram/**',
      'node_modules/**',
      'playwright-report/**',
      'test-results/**',
    ],
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true } },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      // A number or a truth in a text reads as it is; what must not be there are objects.
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true, allowNullish: true, allowArray: true },
      ],
      // Handlers and adapters share one asynchronous signature; some have nothing to wait for.
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/no-confusing-void-expression': 'off',
      // Rows are spread into plain objects on purpose: their methods are not part of an answer.
      '@typescript-eslint/no-misused-spread': 'off',
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrors: 'none' },
      ],
      '@typescript-eslint/no-unnecessary-condition': [
        'error',
        { allowConstantLoopConditions: true },
      ],
      '@typescript-eslint/no-invalid-void-type': 'off',
      // What a library hands us as unknown is passed on as it came.
      '@typescript-eslint/prefer-promise-reject-errors': 'off',
      'max-lines': ['warn', { max: 400 }],
    },
  },
  {
    files: ['apps/web/**/*.tsx'],
    plugins: { 'react-hooks': reactHooks },
    rules: reactHooks.configs.recommended.rules,
  },
  {
    files: ['**/*.test.{ts,tsx}', 'tests/**/*.ts'],
    rules: {
      // Tests reach into answers whose shape they have just asserted.
      '@typescript-eslint/no-non-null-assertion': 'off',
    },
  },
  ...boundaries,
)
