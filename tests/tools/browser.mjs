import { existsSync } from 'node:fs';
import { CannotGoOn, has } from '../../server/tools/environment.mjs';
import { runStep } from '../../server/tools/run.mjs';

/** The browser of the end-to-end tests: Debian's chromium, or the one CHROMIUM names. */
export const browserPath = () => process.env.CHROMIUM ?? '/usr/bin/chromium';

/** Installs Debian's chromium where that may be done, else says what to install. */
export async function ensureBrowser() {
  if (existsSync(browserPath())) return;
  if (process.env.CHROMIUM === undefined && process.getuid?.() === 0 && has('apt-get')) {
    const env = { DEBIAN_FRONTEND: 'noninteractive' };
    await runStep('Reading the package lists', 'apt-get', ['update'], { env });
    await runStep(
      'Installing chromium',
      'apt-get',
      ['install', '-y', '--no-install-recommends', 'chromium', 'fonts-liberation'],
      { env },
    );
    if (existsSync(browserPath())) return;
  }
  throw new CannotGoOn(
    `The end-to-end tests need Chromium and there is none at ${browserPath()}. On Debian, as root: apt-get install chromium. Elsewhere set CHROMIUM to the browser's path.`,
  );
}
