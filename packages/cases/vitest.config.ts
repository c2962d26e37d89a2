import { defineConfig } from 'vitest/config';

// Analysing all reference records takes seconds on a loaded machine; a slow run is no failure.
export default defineConfig({ test: { testTimeout: 60_000 } });
