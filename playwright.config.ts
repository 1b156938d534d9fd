import { defineConfig } from '@playwright/test';

const isRoot = process.getuid?.() === 0;

/** Run by `npm test -- browser`, which starts the site and names its address. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  workers: 1,
  // A page may be shown while the worker compiles on the same two cores.
  timeout: 180_000,
  // A site that compiles kernels on two cores may once be too slow for a page; the list names what needed a second try.
  retries: 1,
  expect: { timeout: 20_000 },
  use: {
    baseURL: process.env.LEVELBOOK_URL ?? 'http://127.0.0.1:3000',
    browserName: 'chromium',
    viewport: { width: 1440, height: 900 },
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
      args: [
        // Chromium refuses to sandbox itself when root starts it.
        ...(isRoot ? ['--no-sandbox'] : []),
        '--disable-gpu',
        '--disable-dev-shm-usage',
        '--disable-quic',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--no-first-run',
      ],
    },
  },
});
