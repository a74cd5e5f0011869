import { components } from '@shared/vle/components';
import { expect, signIn, test } from './story';

/** Runs in the page: whether anything stands on the first canvas. */
const hasPaintedPixels = `(() => {
  const canvas = document.querySelector('canvas');
  const pixels = canvas?.getContext('2d')?.getImageData(0, 0, canvas.width, canvas.height).data;
  return pixels !== undefined && pixels.some((value, i) => i % 4 === 3 && value > 0);
})()`;

/** The operator's hour: watch the product, enter the laboratory's result, see what it changed, hand over. */
test('an operator sees the value move, enters a sample and sees point, offset and band change', async ({
  watched: page,
  plant,
}) => {
  await signIn(page, 'operator');

  await test.step('the Board shows the product with its unit, limit and quality', async () => {
    const row = page.getByRole('listitem').filter({ hasText: 'Depropaniser' });
    await expect(row).toContainText('mol %');
    await expect(row).toContainText('2.50');
    await expect(row).toContainText(/Good|Uncertain/);
  });

  await test.step('the value follows the simulated tower without a reload', async () => {
    const figure = page.locator('app-board-row .figure');
    const before = await figure.innerText();
    await expect(async () => {
      await plant.advance(5);
      await expect(figure).not.toHaveText(before, { timeout: 1000 });
    }).toPass({ timeout: 30_000 });
  });

  await page.getByRole('link', { name: /Depropaniser/ }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Depropaniser' })).toBeVisible();
  await test.step('the trend is drawn', async () => {
    await expect.poll(() => page.evaluate<boolean>(hasPaintedPixels)).toBe(true);
    await page.getByRole('button', { name: '7 d' }).click();
    await expect(page.getByRole('button', { name: '7 d' })).toHaveAttribute('aria-pressed', 'true');
    await page.getByText('The trend as a table').click();
    await expect(
      page.getByRole('region', { name: 'The trend as a table' }).getByRole('row').nth(3),
    ).toContainText(/Good|Uncertain|Bad/);
  });
  const offsetBefore = await page.locator('app-sensor-card').innerText();

  await page.getByRole('link', { name: 'Samples of this tower' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Samples' })).toBeVisible();

  await test.step('a result is checked while it is typed', async () => {
    const drawnAt = plant.now - 90 * 60_000;
    const truth = await plant.truth(drawnAt - 3 * 60_000);
    const field = (id: string) =>
      page.getByLabel(new RegExp(`^${components.find((one) => one.id === id)!.name} \\(`));
    await field('propane').fill('50');
    await expect(page.getByText(/must sum to between 98 and 102/)).toBeVisible();
    await field('ethane').fill('-1');
    await expect(page.getByText('ethane cannot be negative.')).toBeVisible();
    for (const [id, fraction] of Object.entries(truth)) await field(id).fill((100 * fraction).toFixed(3));
    await expect(page.getByText(/must sum to between/)).toBeHidden();
  });

  await page.getByRole('button', { name: 'Enter the result' }).click();
  await test.step('what it changed is said at once', async () => {
    const effect = page.locator('app-sample-effect');
    await expect(effect).toContainText('The result is used.');
    const cells = effect.getByRole('row').filter({ hasText: 'offset' }).getByRole('cell');
    expect(await cells.nth(0).innerText()).not.toEqual(await cells.nth(1).innerText());
    const band = effect.getByRole('row').filter({ hasText: 'band' }).getByRole('cell');
    expect(await band.nth(0).innerText()).not.toEqual(await band.nth(1).innerText());
    await expect(page.locator('app-sample-row').first()).toContainText('used');
  });

  await page.locator('app-sample-effect').getByRole('link', { name: 'See it on the trend' }).click();
  await plant.advance(1);
  await expect(page.locator('app-sample-card')).toContainText(/It moved the offset from/);
  await expect(page.locator('app-sensor-card')).not.toHaveText(offsetBefore);

  await page.getByRole('link', { name: 'Journal' }).first().click();
  await expect(page.getByText(/entered a sample of Depropaniser/).first()).toBeVisible();

  await page.getByRole('button', { name: /Operator/ }).click();
  await page.getByRole('button', { name: 'Sign out' }).click();
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible();
});

test('a wrong password is refused in words, and what was typed as a name stays', async ({
  watched: page,
}) => {
  await page.goto('/board');
  await page.getByLabel('User name').fill('operator');
  await page.getByLabel('Password', { exact: true }).fill('not the password');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('alert')).toBeVisible();
  await expect(page.getByLabel('User name')).toHaveValue('operator');
});

test('a note written on the trend stands in the Journal', async ({ watched: page }) => {
  await signIn(page, 'supervisor');
  await page.getByRole('link', { name: /Depropaniser/ }).click();
  await page.getByLabel('What happened?').fill('Cloudburst, condenser cold.');
  await page.getByRole('button', { name: 'Leave a note' }).click();
  await expect(page.getByText('The note stands on the trend and in the Journal.')).toBeVisible();
  await page.getByRole('link', { name: 'Journal' }).first().click();
  await expect(page.getByText('Cloudburst, condenser cold.').first()).toBeVisible();
});
