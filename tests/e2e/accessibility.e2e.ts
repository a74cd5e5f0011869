import { expect, expectAccessible, signIn, test } from './story';

/** Runs in the page. */
const fitsTheWindow = 'document.documentElement.scrollWidth <= innerWidth';

const screens = [
  { name: 'Board', path: '/board', ready: 'app-board-row' },
  { name: 'Tower', path: '/towers/depropaniser', ready: 'app-trend-panel canvas' },
  { name: 'Samples', path: '/samples', ready: 'app-sample-row' },
  { name: 'Equilibrium desk', path: '/desk', ready: 'app-answers-panel' },
  { name: 'Journal', path: '/journal', ready: 'main li' },
  { name: 'No such page', path: '/nowhere', ready: 'h1' },
];

for (const scheme of ['light', 'dark'] as const) {
  test.describe(scheme === 'light' ? 'by day' : 'by night', () => {
    test.use({ colorScheme: scheme });

    test('sign-in has no violation of WCAG 2.2 AA', async ({ watched: page }) => {
      await page.goto('/sign-in');
      await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible();
      await expectAccessible(page);
    });

    test('no screen has a violation of WCAG 2.2 AA, wide or narrow', async ({ watched: page }) => {
      await signIn(page, 'engineer');
      for (const { path, ready } of screens) {
        await page.goto(path);
        await page.locator(ready).first().waitFor();
        await expectAccessible(page);
        for (const width of [1024, 390]) {
          // As tall as the page: the bar at the bottom would otherwise lie over some field, wherever one has scrolled to.
          await page.setViewportSize({ width, height: 6000 });
          // A chart follows the window a frame later.
          await expect
            .poll(() => page.evaluate<boolean>(fitsTheWindow), { message: `${path} fits ${width} px` })
            .toBe(true);
        }
        await expectAccessible(page);
        await page.setViewportSize({ width: 1440, height: 900 });
      }
    });
  });
}
