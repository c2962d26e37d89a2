import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const api = `http://127.0.0.1:${process.env.API_PORT ?? '4310'}`;

export default defineConfig({
  plugins: [react()],
  server: { host: '127.0.0.1', proxy: { '/api': { target: api } } },
  // The server's content security policy allows scripts, fonts and images from its own origin only.
  build: { assetsInlineLimit: 0, chunkSizeWarningLimit: 900 },
});
