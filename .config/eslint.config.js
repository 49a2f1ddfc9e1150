import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

const root = dirname(dirname(fileURLToPath(import.meta.url)));

/** Code of the pure zones: the same on a server, in a worker and in a browser, today and in ten years. */
const pureZones = ['app/physics/**/*.ts', 'app/domain/**/*.ts'];

export default tseslint.config(
  { ignores: ['node_modules/', 'build/', '.react-router/', '.data/', 'public/', 'db/migrations/'] },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommended],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: root } },
    rules: {
      eqeqeq: 'error',
      'prefer-const': 'error',
      'no-console': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/only-throw-error': 'off',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    languageOptions: { ecmaVersion: 2024, sourceType: 'module' },
    rules: { eqeqeq: 'error', 'prefer-const': 'error', 'no-unused-vars': ['error', { argsIgnorePattern: '^_' }], 'no-var': 'error' },
  },
  {
    files: ['app/**/*.tsx', 'tests/**/*.tsx'],
    extends: [jsxA11y.flatConfigs.recommended],
    plugins: { 'react-hooks': reactHooks },
    rules: {
      'react-hooks/rules-of-hooks': 'error',
      'react-hooks/exhaustive-deps': 'error',
    },
  },
  {
    files: pureZones,
    rules: {
      'no-restricted-globals': ['error', 'process', 'window', 'document', 'fetch', 'setTimeout', 'setInterval', 'performance', 'crypto'],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'Pass the instant in.' },
        { object: 'Math', property: 'random', message: 'Pass a seeded generator in.' },
      ],
    },
  },
  { files: ['app/cli/**', 'db/migrate.ts', 'db/seed.ts', 'db/seed/**', 'tests/bench/**', 'tests/e2e/screenshots.ts'], rules: { 'no-console': 'off' } },
);
