import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  computed,
  inject,
  input,
  output,
} from '@angular/core';
import type { EChartsCoreOption, EChartsType } from 'echarts/core';
import { NgxEchartsDirective } from 'ngx-echarts';
import type { ChartColours } from '../chart-colours';
import { provideCharts } from '../provide-charts';
import { toTrendOption } from './trend-option';
import { lanes, type TrendPicture, type TrendWords } from './trend-picture';

/** What a key asks of the trend. */
export type TrendStep = 'earlier' | 'later' | 'closer' | 'wider' | 'now';

const steps: Readonly<Record<string, TrendStep>> = {
  ArrowLeft: 'earlier',
  ArrowRight: 'later',
  '+': 'closer',
  '=': 'closer',
  '-': 'wider',
  '−': 'wider',
  End: 'now',
};

/** A stretch is looked at once wheel or drag have rested this long. */
const settleMs = 300;

/** The picture of a trend. Tells where a wheel, a drag or a key would like to look; what is looked at is for others to say. */
@Component({
  selector: 'app-trend-chart',
  imports: [NgxEchartsDirective],
  providers: [provideCharts()],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    tabindex: '0',
    role: 'group',
    'aria-label': 'Trend. Arrow keys move it, plus and minus zoom, End comes back to now.',
    '(keydown)': 'step($event)',
  },
  template: `
    <div
      class="chart"
      echarts
      [style.height.px]="height"
      [options]="option()"
      [autoResize]="true"
      (chartInit)="chart = $event"
      (chartDataZoom)="follow()"
    ></div>
  `,
  styles: `
    :host {
      display: block;
      border-radius: 4px;
    }
  `,
})
export class TrendChart {
  readonly picture = input.required<TrendPicture>();
  readonly words = input.required<TrendWords>();
  readonly colours = input.required<ChartColours>();
  /** A stretch that wheel or drag came to rest on [UTC ms]. */
  readonly looked = output<{ from: number; to: number }>();
  readonly stepped = output<TrendStep>();

  protected readonly height = lanes.height;
  protected readonly option = computed((): EChartsCoreOption =>
    toTrendOption(this.picture(), this.words(), this.colours()),
  );
  protected chart: EChartsType | undefined;
  private settling: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.settling));
  }

  protected follow(): void {
    clearTimeout(this.settling);
    this.settling = setTimeout(() => {
      const [zoom] = (this.chart?.getOption()['dataZoom'] ?? []) as readonly {
        readonly startValue: number;
        readonly endValue: number;
      }[];
      if (zoom) this.looked.emit({ from: Math.round(zoom.startValue), to: Math.round(zoom.endValue) });
    }, settleMs);
  }

  protected step(event: KeyboardEvent): void {
    const step = steps[event.key];
    if (!step || event.ctrlKey || event.metaKey || event.altKey) return;
    // The arrows would scroll the page, End go to its end.
    event.preventDefault();
    this.stepped.emit(step);
  }
}
