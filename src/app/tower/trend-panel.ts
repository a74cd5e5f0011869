import { ChangeDetectionStrategy, Component, computed, inject, input, model, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { SensorDetail, Trend } from '@shared/api/sensors';
import { Clock } from '../core/clock';
import { PlantTime, zoneName } from '../core/plant-time';
import { Preferences } from '../core/preferences';
import { chartColours } from '../ui/chart-colours';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';
import { TrendChart, type TrendStep } from '../ui/trend-chart/trend-chart';
import type { TrendPicture } from '../ui/trend-chart/trend-picture';
import { TrendTable } from './trend-table';
import { endsOf, lookedAt, moved, trendSpans, zoomed, type TrendWindow } from './trend-window';
import { trendWords } from './trend-words';

/** Below this width of the window the picture has less to its sides [px]. */
const narrow = 700;

/** The trend with its controls: how long, where, closer; by button, wheel, drag and key. */
@Component({
  selector: 'app-trend-panel',
  imports: [MatButton, SampleSign, TrendChart, TrendTable],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './trend-panel.html',
  styleUrl: './trend-panel.scss',
  host: { '(window:resize)': 'measure()' },
})
export class TrendPanel {
  private readonly quantities = inject(Quantities);
  private readonly preferences = inject(Preferences);
  private readonly plantTime = inject(PlantTime);
  private readonly clock = inject(Clock);

  readonly sensor = input.required<SensorDetail>();
  readonly trend = input.required<Trend>();
  /** Ends of the time axis [UTC ms]. */
  readonly ends = input.required<{ from: number; to: number }>();
  readonly window = model.required<TrendWindow>();
  readonly isReading = input(false);

  protected readonly spans = trendSpans;
  protected readonly states = ['used', 'held', 'rejected', 'pending'] as const;
  private readonly isNarrow = signal(innerWidth < narrow);
  private readonly isTouched = matchMedia('(pointer: coarse)').matches;
  protected readonly isLive = computed(() => this.window().kind === 'live');
  protected readonly stretchWords = computed(() => {
    const { from, to } = this.ends();
    const now = this.clock.minute();
    return `${this.plantTime.dateTime(from, now)} to ${this.isLive() ? 'now' : this.plantTime.dateTime(to, now)}`;
  });
  protected readonly words = computed(() =>
    trendWords(this.sensor(), this.quantities, this.plantTime, this.clock.minute()),
  );
  protected readonly picture = computed((): TrendPicture => {
    const { limits, symbol } = this.sensor();
    const ends = this.ends();
    return {
      trend: this.trend(),
      symbol,
      limits,
      ...ends,
      latest: endsOf({ kind: 'live', span: ends.to - ends.from }, this.clock.minute()).to,
      isNarrow: this.isNarrow(),
      canDrag: !this.isTouched,
    };
  });
  protected readonly colours = computed(() => chartColours(this.preferences.isNight()));
  /** Both names where the clocks were changed in between. */
  protected readonly zoneWords = computed(() => {
    const { from, to } = this.ends();
    const { zone } = this.plantTime;
    return [...new Set([zoneName(from, zone), zoneName(to, zone)])].join(' and ');
  });

  protected isSpan(span: number): boolean {
    const window = this.window();
    return window.kind === 'live' && window.span === span;
  }

  protected show(span: number): void {
    this.window.set({ kind: 'live', span });
  }

  protected look(ends: { from: number; to: number }): void {
    this.window.set(lookedAt(ends, this.clock.minute()));
  }

  protected take(step: TrendStep): void {
    switch (step) {
      case 'earlier':
        return this.move(-0.5);
      case 'later':
        return this.isLive() ? undefined : this.move(0.5);
      case 'closer':
        return this.zoom(0.5);
      case 'wider':
        return this.zoom(2);
      case 'now':
        return this.toNow();
    }
  }

  protected measure(): void {
    this.isNarrow.set(innerWidth < narrow);
  }

  private zoom(factor: number): void {
    this.window.set(zoomed(this.window(), factor, this.clock.minute()));
  }

  private move(share: number): void {
    this.window.set(moved(this.window(), share, this.clock.minute()));
  }

  private toNow(): void {
    const window = this.window();
    if (window.kind === 'past') this.show(window.to - window.from);
  }
}
