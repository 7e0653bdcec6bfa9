import { defineConfig } from '@playwright/test';

const port = Number(process.env.E2E_PORT ?? 4313);

/** The real server with a fresh database, the exported application and Debian's own Chromium. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results/browser',
  fullyParallel: false,
  workers: 1,
  retries: 0,
  forbidOnly: true,
  timeout: 240_000,
  expect: { timeout: 20_000 },
  use: {
    baseURL: `http://localhost:${port}`,
    locale: 'en-GB',
    timezoneId: 'Europe/Berlin',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  projects: [
    { name: 'phone', use: { viewport: { width: 390, height: 844 }, hasTouch: true } },
    { name: 'wide', use: { viewport: { width: 1440, height: 900 } } },
  ],
  webServer: {
    command: 'node tests/e2e/serve.mjs',
    url: `http://localhost:${port}/api/health`,
    env: { PORT: String(port) },
    timeout: 300_000,
    stdout: 'pipe',
    reuseExistingServer: false,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
  },
});
