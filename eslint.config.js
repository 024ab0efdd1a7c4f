import js from '@eslint/js';
import ts from 'typescript-eslint';
import vue from 'eslint-plugin-vue';
import prettier from 'eslint-config-prettier';

const sizes = {
  'max-lines': ['error', { max: 300 }],
  'max-lines-per-function': ['error', { max: 60, skipBlankLines: false, skipComments: false }],
  'max-params': ['error', 3],
  'max-depth': ['error', 4],
};

export default ts.config(
  { ignores: ['node_modules', 'dist', 'coverage', '.stillspan', 'tests/architecture/fixture', 'reports'] },
  js.configs.recommended,
  ...ts.configs.recommended,
  ...vue.configs['flat/recommended'],
  {
    languageOptions: {
      parserOptions: { parser: ts.parser, extraFileExtensions: ['.vue'] },
      globals: { console: 'readonly', process: 'readonly', URL: 'readonly', fetch: 'readonly', setTimeout: 'readonly' },
    },
    rules: {
      ...sizes,
      eqeqeq: 'error',
      'no-undef': 'off',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/no-namespace': ['error', { allowDeclarations: true }],
      'vue/block-lang': ['error', { script: { lang: 'ts' } }],
      'vue/component-api-style': ['error', ['script-setup']],
    },
  },
  {
    files: ['tests/**/*.ts', '**/*.test.ts'],
    rules: { 'max-lines': ['error', { max: 500 }], 'max-lines-per-function': 'off', 'max-params': 'off' },
  },
  {
    files: ['server/**/*.ts', 'worker/**/*.ts'],
    ignores: ['server/platform/config.ts'],
    rules: { 'no-restricted-syntax': ['error', { selector: "MemberExpression[object.name='process'][property.name='env']", message: 'Only server/platform/config.ts reads the environment.' }] },
  },
  {
    // Express and the OAuth client fix the signatures of error handlers and token callbacks.
    files: ['server/http/**/*.ts', 'server/auth/**/*.ts'],
    rules: { 'max-params': ['error', 5] },
  },
  prettier,
);
