/** Two projects: `node` (shared, api, test/ but for the browser) and `web` (Angular units in jsdom). */
const swc = [
  '@swc/jest',
  {
    jsc: { target: 'es2022', parser: { syntax: 'typescript' }, baseUrl: __dirname, paths: {} },
    module: { type: 'commonjs' },
  },
];
const moduleNameMapper = {
  '^@shared/(.*)$': '<rootDir>/shared/src/$1',
  '^@api/(.*)$': '<rootDir>/api/src/$1',
};

module.exports = {
  projects: [
    {
      displayName: 'node',
      testEnvironment: 'node',
      globalSetup: '<rootDir>/test/support/build-worker.ts',
      globalTeardown: '<rootDir>/test/support/remove-worker.ts',
      rootDir: __dirname,
      roots: ['<rootDir>/shared', '<rootDir>/api', '<rootDir>/test'],
      testMatch: [
        '<rootDir>/{shared,api}/src/**/*.spec.ts',
        '<rootDir>/test/{api,outside,migrations,seeds,tools}/**/*.test.ts',
      ],
      transform: { '^.+\\.ts$': swc },
      moduleNameMapper,
    },
    {
      displayName: 'web',
      preset: 'jest-preset-angular',
      rootDir: __dirname,
      roots: ['<rootDir>/web/src'],
      testMatch: ['<rootDir>/web/src/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/web/setup-jest.ts'],
      transform: {
        '^.+\\.(ts|js|mjs|html|svg)$': [
          'jest-preset-angular',
          { tsconfig: '<rootDir>/web/tsconfig.spec.json', stringifyContentPathRegex: '\\.(html|svg)$' },
        ],
      },
      transformIgnorePatterns: ['node_modules/(?!.*\\.mjs$)'],
      moduleNameMapper,
    },
  ],
};
