import { join } from 'node:path';
import { signIn, test } from './story';

const folder = join(import.meta.dirname, 'pictures');

const pictures = [
  {
    file: 'board-day',
    path: '/board',
    ready: 'app-board-history svg',
    scheme: 'light',
    width: 1440,
    height: 420,
  },
  {
    file: 'tower-day',
    path: '/towers/depropaniser',
    ready: 'app-trend-panel canvas',
    scheme: 'light',
    width: 1440,
    height: 1100,
  },
  {
    file: 'tower-night',
    path: '/towers/depropaniser',
    ready: 'app-trend-panel canvas',
    scheme: 'dark',
    width: 1440,
    height: 1100,
  },
  {
    file: 'samples-day',
    path: '/samples',
    ready: 'app-sample-row',
    scheme: 'light',
    width: 1440,
    height: 1000,
  },
  {
    file: 'desk-day',
    path: '/desk',
    ready: 'app-plots-panel canvas',
    scheme: 'light',
    width: 1440,
    height: 1500,
  },
  { file: 'journal-night', path: '/journal', ready: 'main li', scheme: 'dark', width: 1440, height: 700 },
] as const;

for (const { file, path, ready, scheme, width, height } of pictures)
  test(file, async ({ watched: page }) => {
    await page.emulateMedia({ colorScheme: scheme });
    await page.setViewportSize({ width, height });
    await signIn(page, 'operator');
    await page.goto(path);
    await page.locator(ready).first().waitFor();
    if (file.startsWith('tower')) await page.getByRole('button', { name: '7 d' }).click();
    // Charts are drawn a frame after their data; nothing on the page says when.
    await page.waitForTimeout(1500);
    await page.screenshot({ path: join(folder, `${file}.png`) });
  });
