/** Where the server learns what time it is; tests and the demonstration hand in their own. */
export interface Clock {
  /** UTC milliseconds. */
  now(): number;
}

/** The machine's clock; only `main.ts` and the command-line programs use it. */
export const systemClock: Clock = { now: () => Date.now() };
