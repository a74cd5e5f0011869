import { parentPort } from 'node:worker_threads';
import { InlinePasswordHasher } from './password-hasher';
import type { PasswordAnswer, PasswordTask } from './worker-password-hasher';

/** Half a second of arithmetic a password: here it holds up nobody else. */
const hasher = new InlinePasswordHasher();

parentPort?.on('message', (task: PasswordTask) => {
  const work = task.hash === undefined ? hasher.hash(task.password) : hasher.verify(task.password, task.hash);
  work.then(
    (result) => parentPort?.postMessage({ id: task.id, result } satisfies PasswordAnswer),
    (error: unknown) =>
      parentPort?.postMessage({ id: task.id, failure: String(error) } satisfies PasswordAnswer),
  );
});
