import js from '@eslint/js';
import { defineConfig } from 'eslint/config';
import prettier from 'eslint-config-prettier';
import vue from 'eslint-plugin-vue';
import globals from 'globals';
import ts from 'typescript-eslint';

/** Imports that a layer may not make: the client and the server meet only in `shared`. */
const forbid = (...groups) => ({
  'no-restricted-imports': ['error', { patterns: groups.map(([group, message]) => ({ group, message })) }],
});

export default defineConfig(
  { ignores: ['node_modules/**', 'dist/**', '.data/**', 'coverage/**', 'public/**'] },
  js.configs.recommended,
  ts.configs.recommendedTypeChecked,
  vue.configs['flat/recommended'],
  {
    languageOptions: {
      parserOptions: {
        project: [
          './shared/tsconfig.json',
          './server/tsconfig.json',
          './src/tsconfig.json',
          './tests/tsconfig.json',
        ],
        tsconfigRootDir: new URL('..', import.meta.url).pathname,
        extraFileExtensions: ['.vue'],
      },
    },
    rules: {
      '@typescript-eslint/no-unnecessary-condition': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-explicit-any': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': 'error',
    },
  },
  {
    files: ['**/*.vue'],
    languageOptions: { parserOptions: { parser: ts.parser }, globals: globals.browser },
  },
  {
    files: ['src/**'],
    languageOptions: { globals: globals.browser },
    rules: forbid([['#server/*', '#tests/*'], 'The client knows shared, not the server.']),
  },
  {
    files: ['server/**'],
    rules: forbid([['#src/*', '#tests/*'], 'The server knows shared, not the client.']),
  },
  {
    files: ['shared/**'],
    rules: {
      ...forbid([['#src/*', '#server/*', '#tests/*', 'node:*', 'vue', 'express'], 'shared runs anywhere.']),
      'no-restricted-globals': ['error', 'Date', 'fetch', 'window', 'process', 'document'],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Pass the randomness in.' },
      ],
    },
  },
  {
    files: ['**/*.mjs', '**/*.js'],
    extends: [ts.configs.disableTypeChecked],
    languageOptions: { globals: globals.node },
    rules: { 'no-console': 'off' },
  },
  {
    files: ['server/main.ts', 'server/db/migrate.ts', 'server/db/seed.ts', 'tests/bench/**'],
    rules: { 'no-console': 'off' },
  },
  { files: ['tests/**'], languageOptions: { globals: { ...globals.node, ...globals.browser } } },
  {
    rules: {
      'vue/multi-word-component-names': ['error', { ignores: ['App'] }],
      'vue/component-name-in-template-casing': [
        'error',
        'PascalCase',
        { registeredComponentsOnly: false, ignores: ['/^q-/', '/^router-/'] },
      ],
    },
  },
  prettier,
);
