import { defineConfig } from 'vitest/config';

/** Tests that run the built program: the build is made once for them, whatever dist/ held before. */
const program = ['test/commands/**/*.test.ts', 'test/packaging/**/*.test.ts'];

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'parts',
          include: ['test/**/*.test.ts'],
          exclude: [...program, '**/node_modules/**'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
      {
        test: {
          name: 'program',
          include: program,
          globalSetup: 'test/packaging/build-once.ts',
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});
