import reactHooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'

export default tseslint.config(
  { ignores: ['dist/', '.data/', 'coverage/', 'openapi/*.d.ts'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  tseslint.configs.strict,
  {
    rules: {
      eqeqeq: ['error', 'always'],
      'no-console': 'error',
      'no-unused-vars': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    // A promise that nobody awaits loses its error.
    files: [
      '{api,drizzle,openapi,scripts,solvers}/**/*.{ts,mjs}',
      'tests/*.ts',
      'tests/{api,bench,faults,scripts,solvers}/**/*.ts',
    ],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': 'error',
    },
  },
  {
    files: ['scripts/**', 'tests/**', 'api/server.ts', 'api/migrate.ts', 'api/demo/*', 'openapi/*.ts'],
    rules: { 'no-console': 'off' },
  },
  { files: ['portal/**/*.{ts,tsx}'], extends: [reactHooks.configs.flat.recommended] },
  {
    // Where an index comes from the length, the compiler cannot see that the element is there.
    files: ['portal/**', 'solvers/**', 'tests/**'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
)
