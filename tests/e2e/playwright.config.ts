import { defineConfig } from '@playwright/test';
import { browser } from './browser';

export default defineConfig({
  testDir: '.',
  globalSetup: './build-plant.ts',
  testMatch: '*.e2e.ts',
  outputDir: '../../test-results',
  // Each story has a plant of its own; two at once fit two cores.
  workers: 2,
  timeout: 180_000,
  expect: { timeout: 15_000 },
  reporter: [['list'], ['json']],
  use: browser,
});
