import type { Clock } from '../../../server/clock';

/** A clock that moves only when told. */
export class TestClock implements Clock {
  constructor(private t = Date.UTC(2026, 2, 3, 12)) {}

  now(): number {
    return this.t;
  }

  advance(milliseconds: number): void {
    this.t += milliseconds;
  }
}
