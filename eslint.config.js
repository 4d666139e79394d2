import js from '@eslint/js';
import query from '@tanstack/eslint-plugin-query';
import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import { importX } from 'eslint-plugin-import-x';
import reactHooks from 'eslint-plugin-react-hooks';
import { defineConfig, globalIgnores } from 'eslint/config';
import tseslint from 'typescript-eslint';
import { AREAS, importTable } from './.run/lint/import-table.mjs';
import {
  IN_ALL,
  IN_DATES,
  IN_PRODUCT,
  NO_CHANCE,
  NO_DATE,
  NO_ENVIRONMENT,
  NO_IMPORTED_ENVIRONMENT,
} from './.run/lint/restrictions.mjs';

const PRODUCT = ['server/**/*.ts', 'db/**/*.ts', 'fixtures/**/*.ts', 'client/**/*.{ts,tsx}'];
const WITHOUT_NODE = AREAS.filter(({ node }) => !node).flatMap(({ at }) => at.map((place) => `${place}/**`));

/** Where settings come in: the server's, and those of scripts that people run by hand. */
const READ_SETTINGS = ['server/config.ts', 'db/knexfile.ts', 'db/migrate.ts', 'fixtures/*/seed.ts', 'vite.config.ts', 'tests/support/**', '.run/**'];

export default defineConfig([
  globalIgnores(['dist/', '.cache/', '.data/']),
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },

  js.configs.recommended,
  tseslint.configs.strictTypeChecked,
  {
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      eqeqeq: 'error',
      'no-warning-comments': ['error', { terms: ['todo', 'fixme'], location: 'anywhere' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      // `Record<never, never>` is how a type says that an endpoint takes nothing.
      '@typescript-eslint/no-generated-empty-object-type': 'off',
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      // A mark is read by code points, which is what spreading a text gives; the rule can't be told so for texts known in advance.
      '@typescript-eslint/no-misused-spread': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      // The router takes an answer thrown by a loader for the page's own.
      '@typescript-eslint/only-throw-error': ['error', { allow: [{ from: 'lib', name: 'Response' }] }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/switch-exhaustiveness-check': 'error',
    },
  },

  {
    plugins: { 'import-x': importX },
    settings: {
      'import-x/resolver-next': [createTypeScriptImportResolver({ alwaysTryTypes: false })],
      // Without this only JavaScript is read for the modules it imports, and no cycle is found.
      'import-x/extensions': ['.ts', '.tsx', '.js', '.mjs'],
    },
    rules: {
      'import-x/no-restricted-paths': ['error', importTable(import.meta.dirname)],
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
      'import-x/no-default-export': 'error',
      'import-x/no-duplicates': 'error',
      'import-x/no-self-import': 'error',
      'import-x/no-unresolved': 'error',
      'no-console': 'error',
      'no-restricted-imports': ['error', { paths: NO_IMPORTED_ENVIRONMENT }],
      'no-restricted-properties': ['error', NO_ENVIRONMENT],
      'no-restricted-syntax': ['error', ...IN_ALL],
    },
  },
  { files: WITHOUT_NODE, rules: { 'import-x/no-nodejs-modules': 'error' } },
  {
    files: PRODUCT,
    rules: {
      'import-x/no-extraneous-dependencies': ['error', { devDependencies: ['fixtures/**'], includeTypes: true }],
      'no-restricted-syntax': ['error', ...IN_ALL, ...IN_PRODUCT],
    },
  },
  {
    files: ['server/domain/**/*.ts'],
    rules: {
      'no-restricted-globals': ['error', NO_DATE],
      'no-restricted-properties': ['error', NO_ENVIRONMENT, NO_CHANCE],
    },
  },
  {
    files: ['server/domain/dates/**/*.ts'],
    rules: { 'no-restricted-globals': 'off', 'no-restricted-syntax': ['error', ...IN_ALL, ...IN_PRODUCT, ...IN_DATES] },
  },
  {
    // A query builder can be awaited, so a modifier that returns it looks like an unwatched promise.
    files: ['db/models/**/*.ts'],
    rules: { '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { properties: false } }] },
  },
  { files: READ_SETTINGS, rules: { 'no-restricted-properties': 'off', 'no-restricted-imports': 'off' } },
  { files: ['fixtures/**', 'tests/bench/**'], rules: { 'no-console': 'off' } },

  { files: ['client/**/*.{ts,tsx}', 'tests/client/**/*.{ts,tsx}'], ...reactHooks.configs.flat['recommended-latest'] },
  { files: ['client/**/*.{ts,tsx}'], extends: [query.configs['flat/recommended-strict']] },

  {
    // A wrong claim that something is there fails the test that makes it.
    files: ['tests/**'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    // Tools ask for these to be default exports.
    files: ['eslint.config.js', 'vite.config.ts', 'tailwind.config.ts'],
    rules: { 'import-x/no-default-export': 'off' },
  },
  {
    // The compiler checks these scripts and knows Node's globals; the last two rules don't see that a JSDoc comment gives a type.
    files: ['.run/**/*.mjs', 'server/**/*.mjs'],
    rules: { 'no-undef': 'off', '@typescript-eslint/no-unsafe-assignment': 'off', '@typescript-eslint/no-unsafe-return': 'off' },
  },
  { files: ['eslint.config.js'], ...tseslint.configs.disableTypeChecked },
]);
