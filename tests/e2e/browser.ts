import type { PlaywrightTestOptions, PlaywrightWorkerOptions } from '@playwright/test';

/** Debian's chromium without a GPU, and without the connections it would open by itself. */
export const browser: Partial<PlaywrightTestOptions & PlaywrightWorkerOptions> = {
  browserName: 'chromium',
  viewport: { width: 1440, height: 900 },
  locale: 'en-CA',
  timezoneId: 'UTC',
  trace: 'retain-on-failure',
  launchOptions: {
    executablePath: process.env['CHROMIUM'] ?? '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--font-render-hinting=none',
      '--force-color-profile=srgb',
    ],
  },
};
