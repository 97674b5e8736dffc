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

// The journeys that mostly wait, for excerpts, changes and a dead network. They start first, so that none is left to run
// alone at the end.
const long = ['journey', 'network-loss', 'other-methods', 'preference'].map((name) => `${name}.spec.ts`);

export default defineConfig({
  testDir: '.',
  globalSetup: './global-setup.ts',
  outputDir: '../../test-results',
  timeout: 600_000,
  expect: { timeout: 15_000 },
  // More than cores: a journey spends two thirds of its time waiting.
  workers: 4,
  projects: [
    { name: 'long', testMatch: long },
    { name: 'short', testMatch: '*.spec.ts', testIgnore: long },
  ],
  reporter: [
    ['line'],
    ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ?? '../../test-results/e2e.json' }],
  ],
  use: {
    browserName: 'chromium',
    launchOptions: { executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', args: quiet },
    actionTimeout: 60_000,
    // Pictures along the way cost as much as the journey itself; one of the failure is kept.
    trace: { mode: 'retain-on-failure', screenshots: false },
    screenshot: 'only-on-failure',
    locale: 'en-GB',
    timezoneId: 'Europe/Berlin',
  },
});
