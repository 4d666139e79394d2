import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

/** The zones the pure tests run under: west and east of Greenwich, each with its own rule for summer time. */
const TIME_ZONES = ['America/New_York', 'Australia/Lord_Howe'] as const;

/**
 * Files that need modules of their own: two put a stand-in in place of a package, and drawing starts from SVG, which the server, once it has
 * opened a photo, has forbidden the image library to read.
 */
const BY_THEMSELVES = ['tests/server/people/sign-in.test.ts', 'tests/server/people/sign-up.test.ts', 'tests/fixtures/photos/draw-photo.test.ts'];

/** Where the development server passes API calls; `npm run dev` sets it. */
const apiOrigin = process.env['POURBOOK_API_ORIGIN'] ?? 'http://127.0.0.1:5080';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: { outDir: 'dist/client', assetsInlineLimit: 0, sourcemap: true },
  server: {
    host: '127.0.0.1',
    proxy: { '/api': apiOrigin, '/photos': apiOrigin, '/healthz': apiOrigin, '/readyz': apiOrigin },
    // PostgreSQL's own files change all the time.
    watch: { ignored: ['**/.data/**', '**/.cache/**'] },
  },
  test: {
    projects: [
      ...TIME_ZONES.map((zone) => ({
        extends: true as const,
        test: {
          name: `domain ${zone}`,
          include: ['tests/domain/**/*.test.ts'],
          environment: 'node',
          // Importing a module does nothing, so that files can share what is loaded: that is most of the time.
          isolate: false,
          env: { TZ: zone },
          sequence: { shuffle: { files: true, tests: false } },
        },
      })),
      {
        extends: true as const,
        test: {
          name: 'client',
          include: ['tests/client/**/*.test.{ts,tsx}'],
          environment: 'jsdom',
          isolate: false,
          setupFiles: ['tests/support/client-setup.ts'],
        },
      },
      ...[true, false].map((shared) => ({
        extends: true as const,
        test: {
          name: shared ? 'server' : 'server alone',
          include: shared ? ['tests/server/**/*.test.ts', 'tests/db/**/*.test.ts', 'tests/fixtures/**/*.test.ts'] : BY_THEMSELVES,
          exclude: shared ? BY_THEMSELVES : [],
          environment: 'node',
          isolate: !shared,
          env: { TZ: 'America/New_York' },
          globalSetup: ['tests/support/database-template.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      })),
      {
        extends: true as const,
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          environment: 'node',
          globalSetup: ['tests/support/browser-server.ts'],
          fileParallelism: false,
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});
