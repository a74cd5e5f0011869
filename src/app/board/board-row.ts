import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import {
  mdiAlertOctagonOutline,
  mdiAlertOutline,
  mdiArrowBottomRight,
  mdiArrowRight,
  mdiArrowTopRight,
} from '@mdi/js';
import type { Sensor } from '@shared/api/sensors';
import { Clock } from '../core/clock';
import { AgeText } from '../ui/age-text';
import { BandGauge } from '../ui/band-gauge';
import { Glyph } from '../ui/glyph';
import { durationWords } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { QualityChip } from '../ui/quality-chip';
import { isStale, type Attention } from '../ui/attention';
import { BoardHistory } from './board-history';
import { chanceWords, direction } from '../ui/sensor-words';

/** One product: how much, against what, which way, and how far to trust it. */
@Component({
  selector: 'app-board-row',
  imports: [AgeText, BandGauge, BoardHistory, Glyph, QualityChip, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-row.html',
  styleUrl: './board-row.scss',
  host: {
    '[class.urgent]': "attention().tone === 'urgent'",
    '[class.attention]': "attention().tone === 'attention'",
    '[class.stale]': 'hasStopped()',
  },
})
export class BoardRow {
  private readonly clock = inject(Clock);
  protected readonly quantities = inject(Quantities);

  readonly sensor = input.required<Sensor>();
  readonly attention = input.required<Attention>();

  protected readonly glyphs = {
    urgent: mdiAlertOctagonOutline,
    attention: mdiAlertOutline,
    rising: mdiArrowTopRight,
    falling: mdiArrowBottomRight,
    steady: mdiArrowRight,
  };
  private readonly reference = computed(() => {
    const { limits, latest } = this.sensor();
    return limits.high ?? limits.low ?? latest?.value ?? 0;
  });
  protected readonly decimals = computed(() => this.quantities.fractionDecimals(this.reference()));
  protected readonly value = computed(() => {
    const value = this.sensor().latest?.value ?? null;
    return value === null ? null : this.quantities.fraction(value, this.decimals());
  });
  protected readonly direction = computed(() => direction(this.sensor().slopePerHour, this.reference()));
  protected readonly slope = computed(() => {
    const slope = this.sensor().slopePerHour;
    return slope === null ? '' : `${this.quantities.fractionChange(slope, this.decimals())} per h`;
  });
  protected readonly chance = computed(() => chanceWords(this.sensor()));
  /** What to say besides the quality, which speaks for itself where it is Uncertain. */
  protected readonly need = computed(() => {
    const { kind, words } = this.attention();
    const { latest } = this.sensor();
    if (kind === 'uncertain') return '';
    return kind === 'stale' && latest ? `${words} for ${durationWords(this.clock.now() - latest.t)}` : words;
  });
  protected readonly hasStopped = computed(() => isStale(this.sensor(), this.clock.now()));
  /** How long no new minute has come, where something else is said first. */
  protected readonly staleToo = computed(() => {
    const { latest } = this.sensor();
    const isSaid = this.attention().kind === 'stale';
    return latest && this.hasStopped() && !isSaid ? durationWords(this.clock.now() - latest.t) : null;
  });
  /** The last sample, where it is not the one in use. */
  protected readonly otherSample = computed(() => {
    const sample = this.sensor().lastSample;
    return sample && sample.state !== 'used' ? sample : null;
  });
}
