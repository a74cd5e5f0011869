import { ChangeDetectionStrategy, Component, computed, inject, input, model, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { EChartsCoreOption, EChartsType } from 'echarts/core';
import { NgxEchartsDirective } from 'ngx-echarts';
import type { SensorDetail, Trend } from '@shared/api/sensors';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { Preferences } from '../core/preferences';
import { chartColours } from '../ui/chart-colours';
import { provideCharts } from '../ui/provide-charts';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';
import { toTrendOption, type TrendPicture, type TrendWords } from './trend-option';
import { TrendTable } from './trend-table';
import { endsOf, moved, trendSpans, zoomed, type TrendWindow } from './trend-window';

/** What the chart tells of a wheel or drag. */
interface ZoomEvent {
  readonly batch?: readonly { readonly start?: number; readonly end?: number }[];
  readonly start?: number;
  readonly end?: number;
}

/** Finer data are fetched once the wheel has rested this long. */
const settleMs = 350;

/** The trend with its controls: how long, where, closer; by button, wheel and key. */
@Component({
  selector: 'app-trend-panel',
  imports: [MatButton, NgxEchartsDirective, SampleSign, TrendTable],
  providers: [provideCharts()],
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
  protected readonly isNarrow = signal(innerWidth < 700);
  protected readonly isLive = computed(() => this.window().kind === 'live');
  protected readonly stretchWords = computed(() => {
    const { from, to } = this.ends();
    const now = this.clock.minute();
    return `${this.plantTime.dateTime(from, now)} to ${this.isLive() ? 'now' : this.plantTime.dateTime(to, now)}`;
  });

  private readonly words = computed((): TrendWords => {
    const { quantities, plantTime, sensor } = this;
    const decimals = quantities.fractionDecimals(sensor().limits.high ?? sensor().latest?.value ?? 0);
    const now = this.clock.minute();
    const offsetUnit = {
      temperature: quantities.temperatureChangeUnit(),
      fraction: 'mol/mol',
      'ln-fraction': 'ln units',
    }[sensor().version?.parameters.correction.domain ?? 'temperature'];
    const isKelvin = (sensor().version?.parameters.correction.domain ?? 'temperature') === 'temperature';
    return {
      fraction: (value) => quantities.toFraction(value),
      fractionUnit: quantities.fractionUnit(),
      temperature: (value) => quantities.toTemperature(value),
      temperatureUnit: quantities.temperatureUnit(),
      pressure: (value) => quantities.toPressure(value),
      pressureUnit: quantities.pressureUnit(),
      offset: (value) => (isKelvin ? quantities.toTemperatureChange(value) : value),
      offsetUnit,
      zoneOffset: plantTime.offset(this.ends().to),
      axisTime: (t) => {
        const time = plantTime.clockTime(t);
        return time === '00:00' ? (plantTime.dateTime(t, now).split(',')[0] ?? time) : time;
      },
      fullTime: (t) => plantTime.dateTime(t, now),
      fractionText: (value) => quantities.fraction(value, decimals),
    };
  });
  private readonly picture = computed((): TrendPicture => {
    const { limits, symbol } = this.sensor();
    return { trend: this.trend(), symbol, limits, ...this.ends(), isNarrow: this.isNarrow() };
  });
  protected readonly option = computed((): EChartsCoreOption =>
    toTrendOption(this.picture(), this.words(), chartColours(this.preferences.isNight())),
  );
  protected readonly zoneWords = computed(() =>
    this.plantTime.timeWithZone(this.ends().to).split(' ').at(-1),
  );

  private chart: EChartsType | undefined;
  private settling: ReturnType<typeof setTimeout> | undefined;

  protected take(chart: EChartsType): void {
    this.chart = chart;
  }

  /** Follows the wheel: looks at what it left in view, and fetches it finer. */
  protected zoomedByHand(event: ZoomEvent): void {
    const { start = 0, end = 100 } = event.batch?.[0] ?? event;
    clearTimeout(this.settling);
    if (start <= 0 && end >= 100) return;
    this.settling = setTimeout(() => {
      const { from, to } = this.ends();
      const span = to - from;
      const next = {
        kind: 'past' as const,
        from: Math.round(from + (span * start) / 100),
        to: Math.round(from + (span * end) / 100),
      };
      this.chart?.dispatchAction({ type: 'dataZoom', start: 0, end: 100 });
      this.look(next.to >= this.clock.minute() ? { kind: 'live', span: next.to - next.from } : next);
    }, settleMs);
  }

  protected isSpan(span: number): boolean {
    const window = this.window();
    return window.kind === 'live' && window.span === span;
  }

  protected show(span: number): void {
    this.look({ kind: 'live', span });
  }

  protected zoom(factor: number): void {
    this.look(zoomed(this.window(), factor, this.clock.minute()));
  }

  protected move(share: number): void {
    this.look(moved(this.window(), share, this.clock.minute()));
  }

  protected toNow(): void {
    const { from, to } = endsOf(this.window(), this.clock.minute());
    this.look({ kind: 'live', span: to - from });
  }

  protected measure(): void {
    this.isNarrow.set(innerWidth < 700);
  }

  private look(window: TrendWindow): void {
    this.window.set(window);
  }
}
