import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { mdiLanDisconnect } from '@mdi/js';
import { Clock } from '../core/clock';
import { Live } from '../core/live';
import { PlantTime } from '../core/plant-time';
import { Glyph } from '../ui/glyph';

/** Whether what is on the screen follows the plant: "live, 12 s ago", or since when it does not. */
@Component({
  selector: 'app-live-state',
  imports: [Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span [class.lost]="isLost()">
      @if (isLost()) {
        <app-glyph [path]="mdiLanDisconnect" />
      }
      {{ words() }}
    </span>
    <span class="for-ears" role="status">{{ announcement() }}</span>
  `,
  styles: `
    :host {
      font-size: 12px;
      color: var(--soft);
      font-variant-numeric: tabular-nums;
    }
    .lost {
      color: var(--urgent);
      font-weight: 500;
    }
  `,
})
export class LiveState {
  private readonly live = inject(Live);
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);

  protected readonly mdiLanDisconnect = mdiLanDisconnect;
  protected readonly isLost = computed(() => this.live.state().kind === 'lost');

  protected readonly words = computed(() => {
    const state = this.live.state();
    switch (state.kind) {
      case 'lost':
        return `connection lost since ${this.plantTime.clockTime(state.since)}, trying again`;
      case 'connected': {
        const seconds = Math.max(0, Math.round((this.clock.now() - (this.live.lastBeat() ?? 0)) / 1000));
        return `live, ${seconds} s ago`;
      }
      case 'connecting':
        return 'connecting';
      case 'off':
        return 'paused';
    }
  });

  /** Said aloud only when the connection is lost or comes back, not each second. */
  protected readonly announcement = computed(() => {
    if (this.isLost()) return 'Connection lost, trying again.';
    return this.live.gaps() > 0 && this.live.connected() ? 'Connection is back.' : '';
  });
}
