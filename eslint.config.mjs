import angular from 'angular-eslint';
import boundaries from 'eslint-plugin-boundaries';
import tseslint from 'typescript-eslint';

const rules = {
  '@typescript-eslint/no-explicit-any': 'error',
  '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
  '@typescript-eslint/no-empty-function': 'off',
  eqeqeq: 'error',
  'no-console': 'off',
};

/** Who may import whom inside the service: router → service → store; the numbers import only themselves. */
const service = {
  files: ['service/src/**/*.ts'],
  plugins: { boundaries },
  settings: {
    'boundaries/include': ['service/src/**/*.ts'],
    'import/resolver': { node: { extensions: ['.ts', '.js', '.json'] } },
    'boundaries/elements': [
      { type: 'regression', pattern: 'service/src/regression/**/*', mode: 'full' },
      { type: 'store', pattern: 'service/src/*/*-store.ts', mode: 'full' },
      { type: 'router', pattern: 'service/src/*/*-router.ts', mode: 'full' },
      { type: 'database', pattern: 'service/src/database/**/*', mode: 'full' },
      { type: 'assembly', pattern: 'service/src/*.ts', mode: 'full' },
      { type: 'rest', pattern: 'service/src/**/*', mode: 'full' },
    ],
  },
  rules: {
    'boundaries/element-types': [
      'error',
      {
        default: 'allow',
        rules: [
          {
            from: ['regression'],
            disallow: ['store', 'router', 'database', 'assembly', 'rest'],
            message: 'regression/ imports nothing of ours',
          },
          {
            from: ['store'],
            disallow: ['router', 'store', 'regression'],
            message: 'a store holds SQL; it imports the database and types',
          },
          {
            from: ['router'],
            disallow: ['store', 'database'],
            message: 'a router calls one service; it never reaches a store',
          },
          { from: ['rest', 'store', 'database'], disallow: ['router'], message: 'only app.ts mounts routers' },
        ],
      },
    ],
  },
};

const noRestrictedImports = (patterns) => ({ 'no-restricted-imports': ['error', { patterns }] });
const foreignPrograms = {
  group: ['**/service/**', '**/migrations/**'],
  message: 'Types come from openapi/, not from the service.',
};

export default tseslint.config(
  { ignores: ['dist/', 'node_modules/', 'data/', '.angular/', 'openapi/types/', 'coverage/', '**/*.js'] },
  { files: ['**/*.ts'], extends: [tseslint.configs.recommended], rules },
  service,
  {
    files: ['console/src/**/*.ts', 'widget/src/**/*.ts'],
    extends: [angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: noRestrictedImports([foreignPrograms]),
  },
  {
    files: [
      'console/src/app/{desk,records,estimators,partners,people,journal,settings,estimates,invitation,sign-in}/**/*.ts',
    ],
    ignores: ['**/*.spec.ts'],
    rules: noRestrictedImports([
      foreignPrograms,
      {
        regex:
          '^\\.\\./(\\.\\./)?(desk|records|estimators|partners|people|journal|settings|estimates|invitation|sign-in)/',
        message: 'A feature imports api/, ui/ and shell/ only, never another feature.',
      },
    ]),
  },
  {
    files: ['console/src/**/*.html', 'widget/src/**/*.html'],
    extends: [angular.configs.templateRecommended, angular.configs.templateAccessibility],
  },
);
