/**
 * Mutation testing of the parts a verdict rests on: `npm run mutate -w packages/metrology`, one part with
 * `npm run mutate -w packages/metrology -- --mutate 'src/conformance/*.ts,!src/conformance/*.test.ts'`.
 * It is a command of its own and no part of `npm test`.
 * @type {import('@stryker-mutator/api/core').PartialStrykerOptions}
 */
export default {
  testRunner: 'vitest',
  vitest: { configFile: 'vitest.mutation.config.mjs', related: false },
  plugins: ['@stryker-mutator/vitest-runner', './mutation/ignore-wording.mjs'],
  ignorers: ['wording'],
  coverageAnalysis: 'perTest',
  mutate: [
    'src/conformance/**/*.ts',
    'src/control-charts/**/*.ts',
    'src/capability/**/*.ts',
    '!src/**/*.test.ts',
    '!src/**/index.ts',
  ],
  // Outside the package, so that a test run beside it never meets the changed copies.
  tempDirName: process.env.MUTATION_FOLDER ?? '../../dist/mutation',
  concurrency: Number(process.env.MUTATION_WORKERS ?? 2),
  timeoutMS: 20_000,
  reporters: ['clear-text', 'progress-append-only', 'json'],
  jsonReporter: { fileName: process.env.MUTATION_REPORT ?? 'reports/mutation.json' },
  clearTextReporter: { allowColor: false, logTests: false, reportTests: false },
  thresholds: { high: 95, low: 90, break: 90 },
};
