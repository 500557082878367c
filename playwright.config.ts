import { defineConfig } from '@playwright/test';
import { chromiumFlags } from './tests/support/chromium.ts';
import { findProduct } from './tests/support/product.ts';
import { chromiumPath } from './server/dev/test-tools.mjs';

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
