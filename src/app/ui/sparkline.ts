import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { sparkPath, sparkRange } from './spark-path';

/** The shape of the last hours, without axes: where it came from and which way it goes. */
@Component({
  selector: 'app-sparkline',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg role="img" [attr.aria-label]="label()">
      @if (limitPlace(); as place) {
        <line class="limit" x1="0" x2="100%" [attr.y1]="place" [attr.y2]="place" />
      }
      <svg viewBox="0 0 100 100" width="100%" height="100%" preserveAspectRatio="none">
        <path vector-effect="non-scaling-stroke" [attr.d]="path()" />
      </svg>
      @if (last(); as last) {
        <circle r="2.5" [attr.cx]="last.x + '%'" [attr.cy]="last.y + '%'" />
      }
    </svg>
  `,
  styles: `
    :host {
      display: block;
      height: 38px;
      padding: 3px;
    }
    svg {
      display: block;
      width: 100%;
      height: 100%;
      overflow: visible;
    }
    path {
      fill: none;
      stroke: var(--inferred);
      stroke-width: 1.5;
      stroke-linejoin: round;
    }
    circle {
      fill: var(--inferred);
    }
    .limit {
      stroke: var(--limit);
      stroke-dasharray: 4 3;
    }
  `,
})
export class Sparkline {
  /** Times [UTC ms], oldest first, and the value at each; null leaves a gap. */
  readonly t = input.required<readonly number[]>();
  readonly value = input.required<readonly (number | null)[]>();
  /** The span shown [UTC ms]. */
  readonly from = input.required<number>();
  readonly to = input.required<number>();
  /** Drawn where it lies among the values. */
  readonly limit = input<number | null>(null);
  readonly label = input.required<string>();

  private readonly span = computed(() => ({ from: this.from(), to: this.to() }));
  private readonly range = computed(() => sparkRange(this.value(), this.limit()));
  protected readonly path = computed(() => sparkPath(this.t(), this.value(), this.span(), this.range()).path);
  protected readonly last = computed(() => sparkPath(this.t(), this.value(), this.span(), this.range()).last);
  protected readonly limitPlace = computed(() => {
    const limit = this.limit();
    const { low, high } = this.range();
    if (limit === null || this.last() === null || limit < low || limit > high) return null;
    return `${(100 * (high - limit)) / (high - low)}%`;
  });
}
