import { defineConfig } from '@playwright/test';

const quiet = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--no-first-run',
];

export default defineConfig({
  testDir: '.',
  outputDir: '../../test-results',
  timeout: 600_000,
  expect: { timeout: 15_000 },
  workers: 2,
  reporter: [
    ['line'],
    ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ?? '../../test-results/e2e.json' }],
  ],
  use: {
    browserName: 'chromium',
    launchOptions: { executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', args: quiet },
    actionTimeout: 60_000,
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    locale: 'en-GB',
    timezoneId: 'Europe/Berlin',
  },
});
