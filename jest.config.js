/** Three kinds of test: Angular specs (jsdom), everything else in Node, and Chromium (run by themselves, one at a time). */
const node = {
  testEnvironment: 'node',
  transform: {
    '^.+\\.ts$': [
      '@swc/jest',
      { jsc: { target: 'es2022', parser: { syntax: 'typescript' } }, module: { type: 'commonjs' } },
    ],
  },
};
const angular = {
  preset: 'jest-preset-angular',
  setupFilesAfterEnv: ['<rootDir>/test/support/angular-setup.ts'],
  transform: {
    '^.+\\.(ts|js|mjs|html|svg)$': [
      'jest-preset-angular',
      { tsconfig: '<rootDir>/tsconfig.spec.json', stringifyContentPathRegex: '\\.(html|svg)$' },
    ],
  },
  moduleNameMapper: { '^@contract/(.*)$': '<rootDir>/openapi/types/$1', '^@widget/(.*)$': '<rootDir>/widget/src/$1' },
  transformIgnorePatterns: ['node_modules/(?!.*\\.mjs$|d3-|internmap|@angular)'],
};

module.exports = {
  // One scrypt hash takes half a second, several while two workers are busy.
  testTimeout: 30_000,
  projects: [
    { displayName: 'service', roots: ['<rootDir>/service'], ...node },
    { displayName: 'numerics', roots: ['<rootDir>/test/numerics'], ...node },
    { displayName: 'migrations', roots: ['<rootDir>/test/migrations'], ...node },
    { displayName: 'api', roots: ['<rootDir>/test/api'], ...node },
    { displayName: 'console', roots: ['<rootDir>/console'], ...angular },
    { displayName: 'widget', roots: ['<rootDir>/widget'], ...angular },
    { displayName: 'browser', roots: ['<rootDir>/test/browser'], ...node },
  ],
};
