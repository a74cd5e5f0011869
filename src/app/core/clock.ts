import { DestroyRef, Injectable, computed, inject, signal } from '@angular/core';
import { wallTime } from './wall-time';

/** The server's clock as this screen knows it. Nothing else on the client asks what time it is. */
@Injectable({ providedIn: 'root' })
export class Clock {
  private readonly readWallTime = inject(wallTime);
  /** Server minus device [ms]. Devices in control rooms are often minutes off. */
  private offset = 0;
  private readonly time = signal(this.readWallTime());

  /** UTC milliseconds, renewed each second. */
  readonly now = this.time.asReadonly();
  /** UTC milliseconds of the last full minute: for what need not change each second. */
  readonly minute = computed(() => Math.floor(this.time() / 60_000) * 60_000);

  constructor() {
    const ticking = setInterval(() => this.tick(), 1000);
    inject(DestroyRef).onDestroy(() => clearInterval(ticking));
  }

  /** Takes the server's time, just received, as now. */
  follow(serverNow: number): void {
    this.offset = serverNow - this.readWallTime();
    this.tick();
  }

  private tick(): void {
    this.time.set(this.readWallTime() + this.offset);
  }
}
