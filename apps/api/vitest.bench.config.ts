import { defineConfig } from 'vitest/config';

/** `pnpm --filter @overtally/api bench`: figures of the built code, printed; no part of the tests. */
export default defineConfig({
  test: { environment: 'node', include: ['bench/**/*.bench.ts'], testTimeout: 120_000, pool: 'forks' },
});
