import { defineConfig } from 'vitest/config';

/** Browser tests drive a running product through Chromium, one file after the other. */
export default defineConfig({
  test: {
    environment: 'node',
    include: ['e2e/**/*.spec.ts'],
    fileParallelism: false,
    testTimeout: 120_000,
    hookTimeout: 180_000,
  },
});
