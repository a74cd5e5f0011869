import { Worker } from 'node:worker_threads';
import { Problem } from '../http/problem';
import type { PasswordHasher } from './password-hasher';

export interface PasswordTask {
  readonly id: number;
  readonly password: string;
  /** The hash to check against; left out, one is made. */
  readonly hash?: string;
}
export type PasswordAnswer =
  | { readonly id: number; readonly result: string | boolean }
  | { readonly id: number; readonly failure: string };

/** Beyond this many waiting (about ten seconds of work) a sign-in is refused rather than queued. */
const mostWaiting = 20;

interface Waiting {
  readonly task: PasswordTask;
  resolve(result: string | boolean): void;
  reject(error: Error): void;
}

/** Hashes in a worker thread, one password at a time. */
export class WorkerPasswordHasher implements PasswordHasher {
  readonly #file: URL;
  #worker: Worker | undefined;
  #current: Waiting | undefined;
  #waiting: Waiting[] = [];
  #nextId = 1;

  /** @param file the bundled worker; by default the one beside the bundle this code is in */
  constructor(file: URL = new URL('./password.worker.js', import.meta.url)) {
    this.#file = file;
  }

  async hash(password: string): Promise<string> {
    return String(await this.#run({ id: this.#nextId++, password }));
  }

  async verify(password: string, hash: string): Promise<boolean> {
    return (await this.#run({ id: this.#nextId++, password, hash })) === true;
  }

  async close(): Promise<void> {
    const worker = this.#worker;
    this.#fail(new Error('The server is shutting down.'));
    await worker?.terminate();
  }

  #run(task: PasswordTask): Promise<string | boolean> {
    if (this.#waiting.length >= mostWaiting)
      return Promise.reject(
        new Problem(503, 'busy', 'Too many people are signing in at this moment. Try again in ten seconds.', {
          retryAfterSeconds: 10,
        }),
      );
    return new Promise((resolve, reject) => {
      this.#waiting.push({ task, resolve, reject });
      this.#startNext();
    });
  }

  #startNext(): void {
    if (this.#current) return;
    this.#current = this.#waiting.shift();
    if (this.#current) this.#ready().postMessage(this.#current.task);
  }

  #ready(): Worker {
    if (this.#worker) return this.#worker;
    const worker = new Worker(this.#file);
    worker.unref();
    worker.on('message', (answer: PasswordAnswer) => this.#settle(answer));
    // A worker that dies takes the sign-ins it had with it; the next one starts another.
    worker.on('error', (error) => {
      if (this.#worker === worker) this.#fail(error);
    });
    this.#worker = worker;
    return worker;
  }

  #settle(answer: PasswordAnswer): void {
    const done = this.#current;
    if (done?.task.id !== answer.id) return;
    this.#current = undefined;
    if ('failure' in answer) done.reject(new Error(answer.failure));
    else done.resolve(answer.result);
    this.#startNext();
  }

  #fail(error: Error): void {
    const lost = [...(this.#current ? [this.#current] : []), ...this.#waiting];
    this.#worker = undefined;
    this.#current = undefined;
    this.#waiting = [];
    for (const waiting of lost) waiting.reject(error);
  }
}
