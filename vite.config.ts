import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const server = `http://127.0.0.1:${process.env.PORT ?? '4180'}`;

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: { outDir: 'dist/client', manifest: true, sourcemap: false, chunkSizeWarningLimit: 700 },
  server: {
    proxy: {
      '/api': server,
      '/socket.io': { target: server, ws: true },
      // Frozen documents, bundles and what leads search engines come from the server; the pages themselves from here.
      '^/p/[^/]+/([0-9a-f]+\\.json|bundle\\.zip)$': server,
      '^/(sitemap\\.xml|robots\\.txt)$': server,
    },
  },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          testTimeout: 120_000,
          include: ['tests/shared/**/*.test.ts', 'tests/src/**/*.test.ts', 'tests/guards/**/*.test.ts'],
          // Two cores are what a small machine has; left alone, one of them would rest.
          maxWorkers: 2,
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts', 'tests/live/**/*.test.ts', 'tests/blind/**/*.test.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
          globalSetup: 'tests/support/global-setup.ts',
          // The modules of the server and a migrated database serve a worker from its first file to its last.
          isolate: false,
        },
      },
    ],
  },
});
