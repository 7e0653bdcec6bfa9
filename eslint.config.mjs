import { defineConfig, globalIgnores } from 'eslint/config';
import expo from 'eslint-config-expo/flat.js';
import { configs as typescript } from 'typescript-eslint';

import { layerRule } from './tests/support/lint/layer-rule.mjs';

const layers = {
  plugins: { stillfield: { rules: { layers: layerRule } } },
  rules: { 'stillfield/layers': ['error', { root: import.meta.dirname }] },
};

export default defineConfig([
  globalIgnores(['dist', 'data', '.expo', 'db/migrations', 'test-results', 'playwright-report', '**/*.d.ts']),
  expo,
  typescript.recommended,
  layers,
  {
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      // TypeScript resolves names and imports, and better.
      'no-undef': 'off',
      'import/no-unresolved': 'off',
      'import/namespace': 'off',
      'import/named': 'off',
      'import/no-named-as-default': 'off',
      'import/no-named-as-default-member': 'off',
      'import/order': [
        'error',
        {
          groups: ['builtin', 'external', ['parent', 'sibling', 'index', 'internal']],
          'newlines-between': 'always',
        },
      ],
      eqeqeq: ['error', 'smart'],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'] }],
      'no-console': ['error', { allow: ['warn', 'error'] }],
      'no-unused-vars': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
    },
  },
  {
    files: ['app/**', 'src/**'],
    rules: {
      'no-restricted-globals': [
        'error',
        { name: 'fetch', message: 'src/api/client.ts is the only place that asks the server.' },
      ],
    },
  },
  { files: ['src/api/**'], rules: { 'no-restricted-globals': 'off' } },
  {
    files: ['src/**', 'server/**', 'db/**', 'models/**'],
    rules: { 'import/no-default-export': 'error' },
  },
  {
    files: ['models/**'],
    rules: {
      'no-restricted-globals': [
        'error',
        ...['Date', 'performance', 'process', 'console', 'setTimeout', 'crypto', 'fetch', 'window'].map(
          (name) => ({
            name,
            message: 'The model is a pure function of its input: hand in what it needs.',
          }),
        ),
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'The same input must give the same answer.' },
      ],
    },
  },
  {
    files: ['tests/**', 'server/cli/**', 'server/main.ts', '*.mjs', '*.js', '*.ts'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['metro.config.js'],
    rules: { '@typescript-eslint/no-require-imports': 'off' },
  },
  // Playwright hands a fixture on through a function that is called `use`.
  { files: ['tests/e2e/**'], rules: { 'react-hooks/rules-of-hooks': 'off' } },
  {
    files: ['tests/**'],
    // A reply of the server may be anything until a test has looked at it.
    rules: { '@typescript-eslint/no-explicit-any': 'off', '@typescript-eslint/no-non-null-assertion': 'off' },
  },
]);
