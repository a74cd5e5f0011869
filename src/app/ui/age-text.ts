import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Clock } from '../core/clock';
import { durationWords } from './numbers';

/** How long ago something was: `6 h 10 min`, kept up to date. */
@Component({
  selector: 'app-age-text',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '{{ words() }}',
  styles: `
    :host {
      white-space: nowrap;
      font-variant-numeric: tabular-nums;
    }
  `,
})
export class AgeText {
  private readonly clock = inject(Clock);
  /** UTC milliseconds. */
  readonly since = input.required<number>();
  protected readonly words = computed(() => durationWords(this.clock.now() - this.since()));
}
