import { defineConfig } from 'vitest/config';

/** The tests mutants are run against: all but the million random readings, which would take seconds a mutant. */
export default defineConfig({
  test: {
    environment: 'node',
    isolate: false,
    include: [
      `src/${process.env.MUTATION_TESTS ?? '{decimal,conformance,control-charts,capability}/**/*'}.test.ts`,
    ],
    exclude: ['src/conformance/exactness.test.ts'],
  },
});
