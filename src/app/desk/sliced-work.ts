/** Work that gives way after each `yield` and ends with a result. */
export type Slices<T> = Generator<undefined, T, undefined>;

/** Longest a slice may hold the page [ms]: with what a drag itself costs, it still fits a frame of 16.7 ms. */
const sliceMs = 6;

/**
 * Works off the latest request a slice at a time between frames, so that a drag never waits for a plot.
 *
 * Work once begun is finished even when a newer request has come: with each request cancelling the one before, a plot would
 * stand still as long as a slider moves. Of the requests that came meanwhile only the last is worked off.
 */
export class SlicedWork<T> {
  private running: Slices<T> | null = null;
  private waiting: (() => Slices<T>) | null = null;
  private stopped = false;

  /**
   * @param later calls back when the page has time, after the next frame
   * @param now a clock [ms]
   * @param done takes each result
   */
  constructor(
    private readonly later: (resume: () => void) => void,
    private readonly now: () => number,
    private readonly done: (result: T) => void,
  ) {}

  request(begin: () => Slices<T>): void {
    this.waiting = begin;
    if (!this.running) this.next();
  }

  stop(): void {
    this.stopped = true;
    this.waiting = null;
  }

  private next(): void {
    const begin = this.waiting;
    this.waiting = null;
    this.running = begin?.() ?? null;
    if (this.running) this.later(() => this.advance());
  }

  private advance(): void {
    const work = this.running;
    if (!work || this.stopped) return;
    const end = this.now() + sliceMs;
    do {
      const step = this.step(work);
      if (step.done) {
        this.done(step.value);
        return this.next();
      }
    } while (this.now() < end);
    this.later(() => this.advance());
  }

  /** One step; a fault in one request must not keep later ones from being worked off. */
  private step(work: Slices<T>): IteratorResult<undefined, T> {
    try {
      return work.next();
    } catch (fault) {
      this.next();
      throw fault;
    }
  }
}

/** Calls back after the next frame was drawn. */
export function afterFrame(view: Window): (resume: () => void) => void {
  // The callback of a frame runs before it is drawn; a task set from there, after.
  return (resume) => view.requestAnimationFrame(() => view.setTimeout(resume));
}
