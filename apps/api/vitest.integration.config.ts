import { defineConfig } from 'vitest/config';

/** The built application over HTTP, on databases cloned from one migrated template. */
export default defineConfig({
  test: {
    environment: 'node',
    include: ['test/**/*.e2e-spec.ts'],
    globalSetup: ['test/support/template-database.ts'],
    setupFiles: ['reflect-metadata'],
    maxWorkers: 2,
    testTimeout: 90_000,
    hookTimeout: 120_000,
  },
});
