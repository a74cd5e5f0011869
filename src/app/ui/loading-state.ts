import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Grey shapes of the size of what is coming, so that nothing jumps when it has come. */
@Component({
  selector: 'app-loading-state',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span class="for-ears" role="status">Loading {{ what() }}</span>
    @for (row of shapes(); track row) {
      <div class="shape" aria-hidden="true" [style.height.px]="height()"></div>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
    }
    .shape {
      border-radius: var(--radius);
      background: var(--raised);
      /* What loads at once is not announced by a flash of grey. */
      animation:
        arrive 0.2s 0.15s both,
        breathe 1.6s 0.35s ease-in-out infinite alternate;
    }
    @keyframes arrive {
      from {
        opacity: 0;
      }
    }
    @keyframes breathe {
      to {
        opacity: 0.55;
      }
    }
  `,
})
export class LoadingState {
  /** What is being loaded, for people who cannot see the shapes: "the samples". */
  readonly what = input.required<string>();
  /** How many shapes of which height [px]. */
  readonly rows = input(3);
  readonly height = input(84);
  protected readonly shapes = computed(() => Array.from({ length: this.rows() }, (_, row) => row));
}
