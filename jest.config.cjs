const { createCjsPreset } = require('jest-preset-angular/presets');

// Two kinds of code, two projects in one run: Angular code in a browser-like world, everything else in Node.
const aliases = {
  '^@lib/domain$': '<rootDir>/libs/domain/src/index.ts',
  '^@lib/contracts/web$': '<rootDir>/libs/contracts/src/web.ts',
  '^@lib/contracts$': '<rootDir>/libs/contracts/src/index.ts',
  '^@lib/ui$': '<rootDir>/libs/ui/src/index.ts',
  '^@lib/(contracts|domain|ui)/(.+)$': '<rootDir>/libs/$1/src/$2',
};

// These packages ship ES modules only; Jest runs CommonJS, so they are compiled like our own code.
const esmOnly = [
  'dinero.js',
  'rrule-temporal',
  'temporal-polyfill',
  'temporal-spec',
  'temporal-utils',
  'uuid',
  'cookie',
  'csv-parse',
  'jsbi',
  'ical.js',
];

const swc = [
  '@swc/jest',
  { jsc: { parser: { syntax: 'typescript' }, target: 'es2022' }, module: { type: 'commonjs' } },
];
const angularPreset = createCjsPreset({ tsconfig: '<rootDir>/apps/web/tsconfig.spec.json' });

const node = {
  rootDir: __dirname,
  testEnvironment: 'node',
  transform: {
    '^.+\\.[cm]?[tj]s$': swc,
  },
  transformIgnorePatterns: [`/node_modules/(?!(${esmOnly.join('|')})/)`],
  moduleNameMapper: aliases,
};

module.exports = {
  // A worker that has grown to a gigabyte needs more than jest's half second to leave a busy machine,
  // though nothing is left open in it; what does stay open is still told of.
  workerGracefulExitTimeout: 10_000,
  projects: [
    {
      ...angularPreset,
      displayName: 'web',
      rootDir: __dirname,
      testMatch: ['<rootDir>/apps/web/src/**/*.spec.ts', '<rootDir>/libs/ui/src/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/apps/web/jest-setup.ts'],
      transform: {
        [`/node_modules/(${esmOnly.join('|')})/.+\\.js$`]: swc,
        ...angularPreset.transform,
      },
      transformIgnorePatterns: [`/node_modules/(?!(.*\\.mjs$|(${esmOnly.join('|')})/))`],
      moduleNameMapper: aliases,
    },
    {
      ...node,
      displayName: 'node',
      setupFilesAfterEnv: ['<rootDir>/test/support/after-env.ts'],
      testMatch: [
        '<rootDir>/libs/{domain,contracts}/src/**/*.spec.ts',
        '<rootDir>/server/src/**/*.spec.ts',
        '<rootDir>/infra/**/*.spec.ts',
      ],
    },
    {
      ...node,
      displayName: 'checks',
      setupFilesAfterEnv: ['<rootDir>/test/support/after-env.ts'],
      testMatch: ['<rootDir>/test/checks/**/*.spec.ts'],
    },
    {
      ...node,
      displayName: 'api',
      testMatch: ['<rootDir>/test/api/**/*.spec.ts'],
      globalSetup: '<rootDir>/test/support/global-setup.ts',
      globalTeardown: '<rootDir>/test/support/global-teardown.ts',
      setupFilesAfterEnv: ['<rootDir>/test/support/after-env.ts'],
    },
    {
      ...node,
      displayName: 'faults',
      testMatch: ['<rootDir>/test/faults/**/*.spec.ts'],
      globalSetup: '<rootDir>/test/support/global-setup.ts',
      globalTeardown: '<rootDir>/test/support/global-teardown.ts',
      setupFilesAfterEnv: ['<rootDir>/test/support/after-env.ts'],
    },
  ],
};
