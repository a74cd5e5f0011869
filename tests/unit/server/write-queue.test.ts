import { expect, it } from 'vitest';
import { WriteQueue } from '../../../server/db/write-queue';

const soon = () => new Promise((resolve) => setImmediate(resolve));

it('runs jobs one after another in the order asked, whatever they take', async () => {
  const queue = new WriteQueue();
  const happened: string[] = [];
  const job = (name: string, turns: number) =>
    queue.run(async () => {
      happened.push(`${name} begins`);
      for (let turn = 0; turn < turns; turn++) await soon();
      happened.push(`${name} ends`);
      return name;
    });
  expect(await Promise.all([job('a', 5), job('b', 0), job('c', 2)])).toEqual(['a', 'b', 'c']);
  expect(happened).toEqual(['a begins', 'a ends', 'b begins', 'b ends', 'c begins', 'c ends']);
});

it('hands a failure to its caller alone and goes on', async () => {
  const queue = new WriteQueue();
  const failing = queue.run(() => Promise.reject(new Error('on purpose')));
  const next = queue.run(() => Promise.resolve('done'));
  await expect(failing).rejects.toThrow('on purpose');
  expect(await next).toBe('done');
});

it('is idle once everything asked for has ended, failures too', async () => {
  const queue = new WriteQueue();
  let isDone = false;
  queue.run(() => Promise.reject(new Error('on purpose'))).catch(() => undefined);
  void queue.run(async () => {
    await soon();
    isDone = true;
  });
  await queue.idle();
  expect(isDone).toBe(true);
});

it('refuses a job from inside a job, and takes it again afterwards', async () => {
  const queue = new WriteQueue();
  await expect(queue.run(() => queue.run(() => Promise.resolve()))).rejects.toThrow(/inside another write/);
  expect(await queue.run(() => Promise.resolve(1))).toBe(1);
});
