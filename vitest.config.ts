import { defineConfig } from 'vitest/config';

/** Server-side tests. The client's run under `ng test`, the browser's under Playwright (test/run.ts starts all). */
export default defineConfig({
  resolve: { alias: { '@contract': new URL('./server/contract/index.ts', import.meta.url).pathname } },
  test: {
    testTimeout: 60_000,
    hookTimeout: 120_000,
    projects: [
      { extends: true, test: { name: 'unit', include: ['server/**/*.spec.ts', 'seeds/**/*.spec.ts'] } },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['test/integration/**/*.spec.ts'],
          globalSetup: 'test/support/global-setup.ts',
          fileParallelism: false,
        },
      },
      {
        extends: true,
        test: { name: 'media', include: ['test/media/**/*.spec.ts'], fileParallelism: false },
      },
    ],
  },
});
