import { existsSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, expect, it, onTestFinished } from 'vitest';
import { InlinePasswordHasher } from '../../server/access/password-hasher';
import { WorkerPasswordHasher } from '../../server/access/worker-password-hasher';
import { buildPrograms, removePrograms } from './support/built-server';
import { temporaryFolder } from './support/temporary-folder';

let folder: string;
beforeAll(async () => {
  folder = await buildPrograms({ 'password.worker': 'server/access/password.worker.ts' });
});
afterAll(() => removePrograms(folder));

function open(file = pathToFileURL(join(folder, 'password.worker.js'))) {
  const hasher = new WorkerPasswordHasher(file);
  onTestFinished(() => hasher.close());
  return hasher;
}

it('hashes in its worker at cost 12, as others can check, and tells right from wrong', async () => {
  const hasher = open();
  const hash = await hasher.hash('dew-point-at-dawn');
  expect(hash).toMatch(/^\$2[aby]\$12\$/);
  expect(await new InlinePasswordHasher().verify('dew-point-at-dawn', hash)).toBe(true);
  expect(await hasher.verify('dew-point-at-dawn', hash)).toBe(true);
  expect(await hasher.verify('dew-point-at-dusk', hash)).toBe(false);
});

it('answers each caller with its own result, in the order asked', async () => {
  const hasher = open();
  const hash = await new InlinePasswordHasher(4).hash('right');
  const order: number[] = [];
  const words = ['right', 'wrong', 'right', 'wrong', 'right'];
  const results = await Promise.all(
    words.map(async (word, i) => {
      const result = await hasher.verify(word, hash);
      order.push(i);
      return result;
    }),
  );
  expect(results).toEqual([true, false, true, false, true]);
  expect(order).toEqual([0, 1, 2, 3, 4]);
});

it('holds the caller’s thread up far less than hashing there would', async () => {
  const longestHold = async (work: () => Promise<unknown>) => {
    let longest = 0;
    let last = performance.now();
    const watch = setInterval(() => {
      longest = Math.max(longest, performance.now() - last);
      last = performance.now();
    }, 1);
    await work();
    clearInterval(watch);
    return longest;
  };
  const hasher = open();
  const hash = await hasher.hash('x');
  const eight = (verifier: { verify(password: string, hash: string): Promise<boolean> }) => () =>
    Promise.all(Array.from({ length: 8 }, () => verifier.verify('x', hash)));
  const inWorker = await longestHold(eight(hasher));
  const inThread = await longestHold(eight(new InlinePasswordHasher()));
  console.log(
    `figure: eight sign-ins at once hold the thread ${inWorker.toFixed(0)} ms by worker, ${inThread.toFixed(0)} ms without`,
  );
  expect(inWorker / inThread).toBeLessThan(0.5);
});

it('refuses a sign-in rather than queueing it behind twenty others', async () => {
  const hasher = open();
  const hash = await new InlinePasswordHasher(4).hash('x');
  const asked = Array.from({ length: 30 }, () => hasher.verify('x', hash));
  const results = await Promise.allSettled(asked);
  // One is being worked on, twenty wait.
  expect(results.filter((result) => result.status === 'fulfilled')).toHaveLength(21);
  expect(results.at(-1)).toMatchObject({ status: 'rejected', reason: { status: 503, code: 'busy' } });
});

it('fails what a dying worker had, and starts another for the next', async () => {
  const file = join(temporaryFolder(), 'worker.mjs');
  const mark = `${file}.died`;
  writeFileSync(
    file,
    `import { parentPort } from 'node:worker_threads';
     import { existsSync, writeFileSync } from 'node:fs';
     parentPort.on('message', ({ id }) => {
       if (existsSync(${JSON.stringify(mark)})) parentPort.postMessage({ id, result: true });
       else { writeFileSync(${JSON.stringify(mark)}, ''); throw new Error('the worker died'); }
     });`,
  );
  const hasher = open(pathToFileURL(file));
  const lost = [hasher.verify('a', 'h'), hasher.verify('b', 'h')];
  for (const result of lost) await expect(result).rejects.toThrow('the worker died');
  expect(existsSync(mark)).toBe(true);
  expect(await hasher.verify('c', 'h')).toBe(true);
});

it('fails what is still waiting when it is closed', async () => {
  const hasher = open();
  const hash = await new InlinePasswordHasher(4).hash('x');
  const waiting = [hasher.verify('x', hash), hasher.verify('x', hash)];
  const results = Promise.allSettled(waiting);
  await hasher.close();
  expect((await results).map(({ status }) => status)).toEqual(['rejected', 'rejected']);
});
