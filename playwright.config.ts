import { defineConfig, devices } from '@playwright/test';

/** The browser's tests: the built client before the real api, worker, database, store, ffmpeg and mail. */
export default defineConfig({
  testDir: 'test/e2e',
  testMatch: '**/*.e2e.ts',
  globalSetup: './test/e2e/support/global-setup.ts',
  outputDir: 'test-results',
  fullyParallel: false,
  workers: 1,
  timeout: 120_000,
  expect: { timeout: 15_000 },
  forbidOnly: true,
  retries: 0,
  reporter: [['list']],
  use: {
    actionTimeout: 15_000,
    ...devices['Desktop Chrome'],
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'Europe/Stockholm',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--autoplay-policy=no-user-gesture-required',
      ],
    },
  },
});
