import expo from 'eslint-config-expo/flat.js';
import prettier from 'eslint-config-prettier/flat';
import { defineConfig } from 'eslint/config';

import { roomsRule } from './scripts/rules/rooms.mjs';

const pure = 'The core reads no clock, zone, locale or chance from its surroundings: take it as an argument.';
const functionLength = (max) => ['error', { max, skipBlankLines: false, skipComments: false, IIFEs: true }];

/** Everything by which a program learns the time, the place or a chance without being told. */
const coreIsPure = {
  files: ['protocols/**'],
  rules: {
    'no-restricted-globals': [
      'error',
      ...['process', 'performance', 'crypto', 'Intl', 'fetch', 'setTimeout', 'setInterval', 'window', 'navigator'].map(
        (name) => ({ name, message: pure }),
      ),
    ],
    'no-restricted-properties': [
      'error',
      { object: 'Date', property: 'now', message: pure },
      { object: 'Math', property: 'random', message: pure },
      { object: 'Temporal', property: 'Now', message: pure },
      ...['toLocaleString', 'toLocaleDateString', 'toLocaleTimeString', 'localeCompare', 'getTimezoneOffset'].map(
        (property) => ({ property, message: pure }),
      ),
    ],
    'no-restricted-syntax': [
      'error',
      { selector: "NewExpression[callee.name='Date']", message: `${pure} Instants are epoch milliseconds.` },
      { selector: "CallExpression[callee.name='Date']", message: pure },
    ],
  },
};

export default defineConfig([
  {
    ignores: [
      'dist/**',
      'build/**',
      '.expo/**',
      '.data/**',
      'coverage/**',
      'shots/**',
      'tests/out/**',
      'expo-env.d.ts',
    ],
  },
  expo,
  prettier,
  { linterOptions: { noInlineConfig: true } },
  {
    plugins: { yardbell: { rules: { rooms: roomsRule } } },
    rules: {
      'yardbell/rooms': 'error',
      'max-lines': ['error', { max: 400, skipBlankLines: false, skipComments: false }],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'] }],
      eqeqeq: ['error', 'always'],
      // both read a package's default export as a mistake where it is the documented way (pg, fast-check, node-cron)
      'import/no-named-as-default-member': 'off',
      'import/no-named-as-default': 'off',
    },
  },
  {
    files: ['**/*.ts', '**/*.tsx'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': [
        'error',
        { 'ts-expect-error': true, 'ts-ignore': true, 'ts-nocheck': true },
      ],
    },
  },
  { ignores: ['tests/**'], rules: { 'max-lines-per-function': functionLength(60) } },
  // screens and the panes and dialogs that they are made of are mostly markup; kit and charts keep the shorter limit
  {
    files: ['app/**', 'components/**/*.tsx'],
    ignores: ['components/ui/**', 'components/theme/**', 'components/charts/**'],
    rules: { 'max-lines-per-function': functionLength(100) },
  },
  coreIsPure,
  {
    files: ['server/**', 'jobs/**', 'scripts/**', 'tests/**', '*.config.{js,ts}'],
    languageOptions: { globals: { process: 'readonly', console: 'readonly', Buffer: 'readonly' } },
  },
]);
