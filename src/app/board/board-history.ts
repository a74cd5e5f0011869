import { httpResource } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  untracked,
} from '@angular/core';
import { sensorsPath, trend, type Sensor } from '@shared/api/sensors';
import { Clock } from '../core/clock';
import { Live } from '../core/live';
import { Quantities } from '../ui/quantities';
import { sparkMeans } from '../ui/spark-path';
import { Sparkline } from '../ui/sparkline';

const spanMs = 8 * 3_600_000;
const stretchMs = 12 * 60_000;

interface Series {
  readonly t: readonly number[];
  readonly value: readonly (number | null)[];
}

/** The last shift of one product as a small line; read after the row stands, then grown by the minute. */
@Component({
  selector: 'app-board-history',
  imports: [Sparkline],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (line(); as line) {
      <app-sparkline
        [t]="line.t"
        [value]="line.value"
        [from]="to() - spanMs"
        [to]="to()"
        [limit]="sensor().limits.high ?? sensor().limits.low"
        [label]="label()"
      />
    } @else if (history.error()) {
      <p class="soft">history not available</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      min-height: 38px;
      align-items: center;
    }
    p {
      font-size: 12px;
    }
  `,
})
export class BoardHistory {
  private readonly clock = inject(Clock);
  private readonly live = inject(Live);
  private readonly quantities = inject(Quantities);

  readonly sensor = input.required<Sensor>();

  protected readonly spanMs = spanMs;
  private readonly id = computed(() => this.sensor().id);
  protected readonly history = httpResource(
    () => {
      this.live.gaps(); // what the stream missed is read again
      const to = untracked(this.clock.minute);
      return { url: `${sensorsPath}/${this.id()}/trend`, params: { from: to - spanMs, to, points: 120 } };
    },
    { parse: trend.parse },
  );
  protected readonly series = linkedSignal<
    { read: Series | undefined; latest: Sensor['latest'] },
    Series | undefined
  >({
    source: () => ({
      read: this.history.hasValue() ? this.history.value().inferred : undefined,
      latest: this.sensor().latest,
    }),
    computation: ({ read, latest }, previous) =>
      withMinute(read && read !== previous?.source.read ? read : previous?.value, latest),
  });
  protected readonly line = computed(() => {
    const series = this.series();
    return series && sparkMeans(series.t, series.value, stretchMs);
  });
  protected readonly to = computed(() => Math.max(this.clock.minute(), this.sensor().latest?.t ?? 0));
  protected readonly label = computed(() => {
    const known = (this.series()?.value ?? []).filter((value) => value !== null);
    const [first, last] = [known[0], known.at(-1)];
    if (first === undefined || last === undefined) return 'last 8 hours: no values';
    const text = (value: number) => this.quantities.fraction(value);
    return `last 8 hours: from ${text(first)} to ${text(last)}, highest ${text(Math.max(...known))} ${this.quantities.fractionUnit()}`;
  });
}

/** The series with the latest minute at its end, and without what has left the span. */
function withMinute(series: Series | undefined, latest: Sensor['latest']): Series | undefined {
  if (!series || !latest || latest.t <= (series.t.at(-1) ?? 0)) return series;
  const first = series.t.findIndex((t) => t >= latest.t - spanMs);
  return {
    t: [...series.t.slice(Math.max(0, first)), latest.t],
    value: [...series.value.slice(Math.max(0, first)), latest.value],
  };
}
