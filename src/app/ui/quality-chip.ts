import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { mdiAlertOctagonOutline, mdiAlertOutline, mdiCheck } from '@mdi/js';
import { reasonWords, type Quality, type QualityReason } from '@shared/inference/quality';
import { Glyph } from './glyph';

const glyphs: Record<Quality, string> = {
  Good: mdiCheck,
  Uncertain: mdiAlertOutline,
  Bad: mdiAlertOctagonOutline,
};

/** Quality in its word, with a sign of its own shape, and why it is not Good. */
@Component({
  selector: 'app-quality-chip',
  imports: [Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span class="word"><app-glyph [path]="glyph()" />{{ quality() }}</span>
    @if (shown().length > 0) {
      <span class="reasons">
        @for (reason of shown(); track reason) {
          <span class="reason">{{ reason }}</span>
        }
        @if (hidden() > 0) {
          <span class="reason">and {{ hidden() }} more</span>
        }
      </span>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .word {
      margin-right: 8px;
      font-weight: 500;
    }
    app-glyph {
      margin-right: 4px;
    }
    .reason:not(:last-child)::after {
      content: ' · ';
    }
    :host(.good) .word {
      font-weight: 400;
      color: var(--soft);
    }
    :host(.uncertain) .word {
      color: var(--attention);
    }
    :host(.bad) .word {
      color: var(--urgent);
    }
  `,
  host: {
    '[class.good]': "quality() === 'Good'",
    '[class.uncertain]': "quality() === 'Uncertain'",
    '[class.bad]': "quality() === 'Bad'",
  },
})
export class QualityChip {
  readonly quality = input.required<Quality>();
  readonly reasons = input<readonly QualityReason[]>([]);
  /** How many reasons to spell out; the rest are counted. */
  readonly limit = input(Number.POSITIVE_INFINITY);

  protected readonly glyph = computed(() => glyphs[this.quality()]);
  protected readonly shown = computed(() => this.reasons().slice(0, this.limit()).map(reasonWords));
  protected readonly hidden = computed(() => this.reasons().length - this.shown().length);
}
