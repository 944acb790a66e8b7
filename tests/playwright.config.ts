import { defineConfig } from '@playwright/test';

const BROWSER = process.env.DIPTYCH_BROWSER ?? '/usr/bin/chromium';

/** Browser tests: the real loopback shell and a real Chromium. */
export default defineConfig({
  testDir: './e2e',
  testMatch: '**/*.e2e.ts',
  outputDir: '../test-results/browser',
  workers: 1,
  timeout: 90_000,
  reporter: [['list'], ['json', { outputFile: '../test-results/playwright.json' }]],
  use: {
    viewport: { width: 1440, height: 900 },
    launchOptions: {
      executablePath: BROWSER,
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
});
