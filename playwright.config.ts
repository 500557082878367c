import { defineConfig } from '@playwright/test';
import { findProduct } from './tests/support/product.ts';
import { chromiumPath } from './server/dev/test-tools.mjs';

/** Debian's Chromium, and nothing of it that talks to the outside. */
const chromiumFlags = [
  // Chromium refuses its sandbox to root, which is who runs it in containers.
  ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

const report = process.env.FLIGHTCASE_TEST_REPORT;

export default defineConfig({
  testDir: 'tests/browser',
  testMatch: '**/*.test.ts',
  outputDir: 'test-results',
  globalSetup: './tests/support/start-product.ts',
  // Two cores: the browser under test, with its own workers, needs the other one.
  workers: 1,
  forbidOnly: process.env.CI !== undefined,
  timeout: 60_000,
  reporter: [['list'], ...(report ? [['json', { outputFile: report }] as const] : [])],
  use: {
    // Known once the set-up has run; workers read this file again afterwards.
    baseURL: findProduct()?.origin,
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    video: 'off',
    launchOptions: { executablePath: chromiumPath, args: chromiumFlags },
  },
  projects: [{ name: 'chromium' }],
});
