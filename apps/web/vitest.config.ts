import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  plugins: [react()],
  // The build takes the part of the package for browsers by itself, tests the one for Node.js.
  resolve: { alias: { 'tus-js-client': 'tus-js-client/lib.esm/browser/index.js' } },
  test: {
    environment: 'happy-dom',
    include: ['src/**/*.spec.{ts,tsx}'],
    setupFiles: ['src/testing/setup.ts'],
    testTimeout: 40_000,
    server: { deps: { inline: ['tus-js-client'] } },
  },
});
