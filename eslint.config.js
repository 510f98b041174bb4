const js = require('@eslint/js');
const angular = require('angular-eslint');
const checkFile = require('eslint-plugin-check-file');
const tseslint = require('typescript-eslint');

const clock = [
  {
    selector: "NewExpression[callee.name='Date'][arguments.length=0]",
    message: 'Take now as an argument, or from deps.clock.',
  },
];
const pureGlobals = [
  'process',
  'Buffer',
  'setTimeout',
  'setInterval',
  'fetch',
  'console',
  'window',
  'document',
].map((name) => ({
  name,
  message: 'shared/ is pure: no I/O, no clock.',
}));
const noClockProperties = [
  { object: 'Date', property: 'now', message: 'Take now as an argument.' },
  { object: 'Math', property: 'random', message: 'Take a seed as an argument.' },
];

module.exports = tseslint.config(
  { ignores: ['dist/', 'node_modules/', '.angular/', 'coverage/', 'data/', 'test-results/'] },
  {
    files: ['**/*.ts'],
    extends: [js.configs.recommended, ...tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { project: ['./{shared,api,tools,test,web}/tsconfig.json'], tsconfigRootDir: __dirname },
    },
    plugins: { 'check-file': checkFile },
    rules: {
      'max-lines': ['error', { max: 400, skipBlankLines: false, skipComments: false }],
      'max-lines-per-function': ['error', { max: 70, skipBlankLines: true, skipComments: true }],
      'check-file/filename-naming-convention': [
        'error',
        { '**/*.ts': '?([0-9]*_)@(+([a-z0-9-])|+([a-z0-9_]))' },
        { ignoreMiddleExtensions: true },
      ],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': [
        'error',
        { fixStyle: 'inline-type-imports', disallowTypeAnnotations: false },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector:
            'CallExpression[callee.property.name=/^(only|skip|todo)$/][callee.object.name=/^(it|test|describe)$/]',
          message: 'No focused or skipped tests.',
        },
      ],
      eqeqeq: ['error', 'always', { null: 'ignore' }],
    },
  },
  {
    // Factories and test suites hold many small functions; the limit is for the small ones.
    files: [
      '**/*.spec.ts',
      'test/**/*.ts',
      'api/src/**/*-service.ts',
      'api/src/**/*-routes.ts',
      'seeds/**/*.ts',
      'migrations/**/*.ts',
    ],
    rules: { 'max-lines-per-function': 'off' },
  },
  {
    files: ['**/*.spec.ts', 'test/**/*.ts'],
    rules: {
      // supertest's body and parsed mails are untyped by nature; what they hold is what the test asserts.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
  {
    files: ['shared/src/**/*.ts'],
    ignores: ['**/*.spec.ts'],
    rules: {
      'no-restricted-globals': ['error', ...pureGlobals],
      'no-restricted-properties': ['error', ...noClockProperties],
      'no-restricted-syntax': ['error', ...clock],
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex: '^(?!\\.|@shared/|zod$|luxon$|rrule$)',
              message: 'shared/ imports zod, luxon, rrule and itself.',
            },
          ],
        },
      ],
    },
  },
  {
    files: ['api/src/**/*.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        { patterns: [{ group: ['**/web/**', '@angular/*'], message: 'api imports shared, never web.' }] },
      ],
    },
  },
  {
    files: ['web/src/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              group: ['@api/*', '**/api/src/**', 'knex', 'express'],
              message: 'web imports shared, never api.',
            },
          ],
        },
      ],
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/component-selector': [
        'error',
        { type: 'element', prefix: ['app', 'db'], style: 'kebab-case' },
      ],
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: ['app', 'db'], style: 'camelCase' },
      ],
      '@angular-eslint/component-class-suffix': 'off',
      '@angular-eslint/directive-class-suffix': 'off',
      // Validators.required and friends are static methods that use no `this`.
      '@typescript-eslint/unbound-method': ['error', { ignoreStatic: true }],
    },
  },
  {
    files: ['web/src/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
  },
);
