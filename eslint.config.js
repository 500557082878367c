import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import importX from 'eslint-plugin-import-x';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

export default tseslint.config(
  {
    ignores: [
      'node_modules/',
      'build/',
      'dist/',
      '.cache/',
      '.data/',
      'coverage/',
      'test-results/',
      'shared/measure/wasm/',
    ],
  },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true } },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    languageOptions: {
      globals: {
        process: 'readonly',
        console: 'readonly',
        URL: 'readonly',
        fetch: 'readonly',
        setTimeout: 'readonly',
        clearTimeout: 'readonly',
        AbortSignal: 'readonly',
        Buffer: 'readonly',
      },
    },
  },
  {
    // Served as they are, without a build.
    files: ['src/public/**/*.js'],
    languageOptions: { globals: { document: 'readonly', localStorage: 'readonly' } },
  },
  {
    // Import zones: shared knows nobody, client and server know shared, nobody knows tests.
    plugins: { 'import-x': importX },
    files: ['**/*.{ts,tsx}'],
    rules: {
      'import-x/no-restricted-paths': [
        'error',
        {
          zones: [
            { target: './shared', from: ['./src', './server', './tests'] },
            { target: './src', from: ['./server', './tests'] },
            { target: './server', from: ['./src', './tests'] },
            { target: './src/ui', from: ['./src/app', './src/routes', './src/check', './shared'] },
          ],
        },
      ],
      'import-x/no-default-export': 'error',
    },
  },
  {
    files: ['*.config.ts'],
    rules: { 'import-x/no-default-export': 'off' },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: { ...reactHooks.configs.recommended.rules },
  },
  prettier,
);
