import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: { environment: 'node', include: ['test/**/*.spec.ts'], testTimeout: 60_000 },
});
