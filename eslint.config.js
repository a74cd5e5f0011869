// @ts-check
import eslint from '@eslint/js';
import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

/** Folders meet only through `shared`; only tests and demo wiring may start a fake. */
const keepApart = (...folders) => ({
  'no-restricted-imports': [
    'error',
    {
      patterns: folders.map((folder) => ({
        group: [`**/${folder}/**`],
        message: `not from here: see DEVELOPERS.md, "Who may import whom"`,
      })),
    },
  ],
});

export default tseslint.config(
  {
    ignores: [
      'node_modules/',
      'dist/',
      '.data/',
      '.angular/',
      '.build/',
      'coverage/',
      'test-results/',
      'playwright-report/',
    ],
  },
  {
    files: ['**/*.ts'],
    extends: [
      eslint.configs.recommended,
      ...tseslint.configs.recommendedTypeChecked,
      ...tseslint.configs.stylisticTypeChecked,
    ],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/unbound-method': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/consistent-type-definitions': 'off',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
    },
  },
  {
    files: ['src/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'app', style: 'camelCase' },
      ],
      '@angular-eslint/component-selector': [
        'error',
        { type: 'element', prefix: 'app', style: 'kebab-case' },
      ],
      '@angular-eslint/component-class-suffix': 'off',
      '@angular-eslint/directive-class-suffix': 'off',
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      ...keepApart('server', 'fakes'),
    },
  },
  { files: ['server/**/*.ts'], rules: keepApart('src', 'fakes') },
  { files: ['fakes/**/*.ts'], rules: keepApart('src', 'server') },
  {
    files: ['shared/**/*.ts'],
    rules: {
      ...keepApart('src', 'server', 'fakes'),
      'no-restricted-globals': ['error', 'Date', 'process', 'window', 'document', 'fetch', 'setTimeout'],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random' },
        { object: 'Date', property: 'now' },
      ],
    },
  },
  {
    files: ['**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
    rules: {},
  },
  {
    files: ['**/*.{js,mjs}'],
    extends: [eslint.configs.recommended, tseslint.configs.disableTypeChecked],
    languageOptions: {
      globals: Object.fromEntries(
        [
          'AbortSignal',
          'URL',
          'clearInterval',
          'clearTimeout',
          'console',
          'fetch',
          'performance',
          'process',
          'setInterval',
          'setTimeout',
        ].map((name) => [name, 'readonly']),
      ),
    },
  },
);
