import { AsyncLocalStorage } from 'node:async_hooks';

/**
 * Runs write transactions one after another in the order they were asked for.
 *
 * A statement that waits for SQLite's lock occupies one of libuv's few threads; enough of them waiting leave no thread
 * for the holder's COMMIT, and the whole process stands still. So nothing of ours ever waits for that lock.
 */
export class WriteQueue {
  #last: Promise<unknown> = Promise.resolve();
  readonly #inside = new AsyncLocalStorage<true>();

  /** @throws Error at once when called from inside another queued job, which would wait for itself for ever */
  run<T>(job: () => Promise<T>): Promise<T> {
    if (this.#inside.getStore())
      return Promise.reject(
        new Error('A write was started inside another write; pass the outer transaction on instead.'),
      );
    const result = this.#last.then(() => this.#inside.run(true, job));
    this.#last = result.catch(() => undefined); // the caller hears of the failure; the queue goes on
    return result;
  }

  /** Resolves when everything asked for so far has ended. */
  async idle(): Promise<void> {
    await this.#last;
  }
}
