import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { mdiAlertOctagonOutline } from '@mdi/js';
import { describeFailure } from '../core/api-error';
import { Glyph } from './glyph';

/** Says what could not be read, what can be done about it, and offers to try again. */
@Component({
  selector: 'app-error-state',
  imports: [Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'alert' },
  template: `
    <p class="title"><app-glyph [path]="mdiAlertOctagonOutline" /> {{ what() }} could not be read</p>
    <p>{{ failure().words }}</p>
    @if (failure().requestId; as id) {
      <p class="soft">
        Request <span class="num">{{ id }}</span>
      </p>
    }
    <button class="outlined" type="button" (click)="retry.emit()">Try again</button>
  `,
  styles: `
    :host {
      display: grid;
      justify-items: start;
      gap: 6px;
      padding: 18px 20px;
      border: 1px solid var(--urgent);
      border-radius: var(--radius);
      background: var(--sheet);
    }
    .title {
      font-weight: 500;
      color: var(--urgent);
    }
    button {
      margin-top: 6px;
    }
  `,
})
export class ErrorState {
  /** Begins the sentence: "The samples". */
  readonly what = input.required<string>();
  /** What the request ended in, as `resource.error()` gives it. */
  readonly error = input.required<unknown>();
  readonly retry = output();

  protected readonly mdiAlertOctagonOutline = mdiAlertOctagonOutline;
  protected readonly failure = computed(() => describeFailure(this.error()));
}
