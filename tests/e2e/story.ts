import AxeBuilder from '@axe-core/playwright';
import { test as base, expect, type Page } from '@playwright/test';
import { fork, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';
import type { PlantAnswer, PlantRequest } from './plant-messages';

const root = join(import.meta.dirname, '../..');

/** The plant of a worker, seen from a test. */
export class Plant {
  constructor(
    private readonly child: ChildProcess,
    readonly url: string,
    public now: number,
  ) {}

  /** Lets minutes pass: the clock moves and each minute is collected and evaluated. */
  async advance(minutes: number): Promise<void> {
    await this.ask({ do: 'advance', minutes });
  }

  /** What the product was, without the laboratory's scatter [mol/mol by component]. */
  async truth(t: number): Promise<Readonly<Record<string, number>>> {
    return (await this.ask({ do: 'truth', t })).truth!;
  }

  async ask(request: PlantRequest): Promise<PlantAnswer> {
    const answered = new Promise<PlantAnswer>((resolve) =>
      this.child.once('message', (answer) => resolve(answer as PlantAnswer)),
    );
    this.child.send(request);
    const answer = await answered;
    this.now = answer.now;
    return answer;
  }
}

export const password = 'dew-point-at-dawn';

export const test = base.extend<{ watched: Page }, { plant: Plant }>({
  plant: [
    // Playwright reads from this pattern what the fixture needs: a browser to show the plant in.
    async ({ browser: _ }, use) => {
      const child = fork(join(root, '.build/e2e/plant.mjs'), [join(root, 'dist/client')], { cwd: root });
      const plant = await new Promise<Plant>((resolve, reject) => {
        child.once('message', (message) => {
          const { url, now } = message as PlantAnswer;
          resolve(new Plant(child, url!, now));
        });
        child.once('exit', (code) => reject(new Error(`the plant ended with ${code}`)));
      });
      await use(plant);
      await plant.ask({ do: 'stop' });
    },
    { scope: 'worker', timeout: 120_000 },
  ],
  baseURL: async ({ plant }, use) => use(plant.url),
  /** A page that fails its test on a console error or a request that would leave the machine. */
  watched: async ({ page, plant }, use) => {
    const faults: string[] = [];
    page.on('console', (message) => {
      // The browser reports refused sign-ins and validation answers as errors of its own.
      if (message.type() === 'error' && !/status of 4\d\d/.test(message.text())) faults.push(message.text());
    });
    page.on('pageerror', (error) => faults.push(error.message));
    page.on('request', (request) => {
      const { protocol, origin } = new URL(request.url());
      if (protocol.startsWith('http') && origin !== plant.url) faults.push(`a request to ${origin}`);
    });
    await use(page);
    expect(faults).toEqual([]);
  },
});

export { expect };

export async function signIn(page: Page, username: string): Promise<void> {
  await page.goto('/board');
  await page.getByLabel('User name').fill(username);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Board' })).toBeVisible();
}

/** No violation of WCAG 2.2 A or AA that a machine can find. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(
    violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`),
  ).toEqual([]);
}
