import { httpResource } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import {
  mdiAlertOctagonOutline,
  mdiAlertOutline,
  mdiArrowBottomRight,
  mdiArrowRight,
  mdiArrowTopRight,
  mdiLanDisconnect,
} from '@mdi/js';
import {
  sensorDetail,
  sensorList,
  sensorsPath,
  trend,
  type Estimate,
  type SensorDetail,
  type Trend,
} from '@shared/api/sensors';
import { describeFailure } from '../core/api-error';
import { Clock } from '../core/clock';
import { Live } from '../core/live';
import { PlantTime } from '../core/plant-time';
import { assess, isStale } from '../ui/attention';
import { AgeText } from '../ui/age-text';
import { CautionText } from '../ui/caution-text';
import { EmptyState } from '../ui/empty-state';
import { ErrorState } from '../ui/error-state';
import { Glyph } from '../ui/glyph';
import { LoadingState } from '../ui/loading-state';
import { durationWords } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { QualityChip } from '../ui/quality-chip';
import { chanceWords, direction } from '../ui/sensor-words';
import { withMinute } from './grown-trend';
import { NextMoveCard } from './next-move-card';
import { NoteForm } from './note-form';
import { SampleCard } from './sample-card';
import { SensorCard } from './sensor-card';
import { TrendPanel } from './trend-panel';
import { endsOf, trendSpans, type TrendWindow } from './trend-window';

/** About how many points a line is drawn with: more than the picture has pixels across would not show. */
const points = 1600;

/** One tower: the trend of a product, what it means, and what to do next. */
@Component({
  selector: 'app-tower',
  imports: [
    AgeText,
    CautionText,
    EmptyState,
    ErrorState,
    Glyph,
    LoadingState,
    NextMoveCard,
    NoteForm,
    QualityChip,
    RouterLink,
    SampleCard,
    SensorCard,
    TrendPanel,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './tower.html',
  styleUrl: './tower.scss',
})
export class Tower {
  private readonly live = inject(Live);
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);
  protected readonly quantities = inject(Quantities);

  /** Of the address: /towers/:towerId?sensor= */
  readonly towerId = input.required<string>();
  readonly sensor = input<string>();

  protected readonly glyphs = {
    rising: mdiArrowTopRight,
    falling: mdiArrowBottomRight,
    steady: mdiArrowRight,
    urgent: mdiAlertOctagonOutline,
    attention: mdiAlertOutline,
    lost: mdiLanDisconnect,
  };

  protected readonly all = httpResource(() => sensorsPath, { parse: sensorList.parse });
  protected readonly siblings = computed(() =>
    this.all.hasValue() ? this.all.value().filter((one) => one.towerId === this.towerId()) : undefined,
  );
  protected readonly sensorId = computed(() => this.sensor() ?? this.siblings()?.[0]?.id);

  /** Read again whenever this moves: after a sample, and after a gap in the stream. */
  protected readonly readings = signal(0);
  protected readonly detail = httpResource(
    () => {
      this.readings();
      const id = this.sensorId();
      return id === undefined ? undefined : `${sensorsPath}/${id}`;
    },
    { parse: sensorDetail.parse },
  );
  /** As read, then as the stream changes it; what was read stays while it is read again. */
  protected readonly current = linkedSignal<
    { read: SensorDetail | undefined; id: string | undefined },
    SensorDetail | undefined
  >({
    source: () => ({ read: this.detail.hasValue() ? this.detail.value() : undefined, id: this.sensorId() }),
    computation: ({ read, id }, previous) =>
      read ?? (previous?.value?.id === id ? previous?.value : undefined),
  });

  protected readonly window = signal<TrendWindow>({ kind: 'live', span: trendSpans[0].ms });
  protected readonly ends = computed(() => endsOf(this.window(), this.clock.minute()));
  protected readonly history = httpResource(
    () => {
      this.readings();
      const id = this.sensorId();
      const window = this.window();
      // A live window grows by the stream; only a change of what is looked at is read.
      const { from, to } = endsOf(window, untracked(this.clock.minute));
      return id === undefined
        ? undefined
        : {
            url: `${sensorsPath}/${id}/trend`,
            params: { from: Math.round(from), to: Math.round(to), points },
          };
    },
    { parse: trend.parse },
  );
  protected readonly shownTrend = linkedSignal<
    { read: Trend | undefined; latest: SensorDetail['latest']; isLive: boolean; id: string | undefined },
    Trend | undefined
  >({
    source: () => ({
      read: this.history.hasValue() ? this.history.value() : undefined,
      latest: this.current()?.latest ?? null,
      isLive: this.window().kind === 'live',
      id: this.sensorId(),
    }),
    computation: ({ read, latest, isLive, id }, previous) => {
      const known =
        read && read !== previous?.source.read
          ? read
          : previous?.value?.sensorId === id
            ? previous?.value
            : read;
      return known && latest && isLive ? withMinute(known, latest) : known;
    },
  });

  private readonly reference = computed(() => {
    const sensor = this.current();
    return sensor?.limits.high ?? sensor?.limits.low ?? sensor?.latest?.value ?? 0;
  });
  protected readonly decimals = computed(() => this.quantities.fractionDecimals(this.reference()));
  protected readonly attention = computed(() => {
    const sensor = this.current();
    return sensor && assess(sensor, this.clock.minute());
  });
  protected readonly direction = computed(() =>
    direction(this.current()?.slopePerHour ?? null, this.reference()),
  );
  protected readonly chance = computed(() => {
    const sensor = this.current();
    return sensor ? chanceWords(sensor) : '';
  });
  /** How the value stands to its limit. */
  protected readonly verdict = computed(() => {
    const sensor = this.current();
    const value = sensor?.latest?.value;
    if (!sensor || value == null) return null;
    const { high, low } = sensor.limits;
    if (high !== null && value > high) return { words: 'above', limit: high, isOff: true };
    if (low !== null && value < low) return { words: 'below', limit: low, isOff: true };
    if (high !== null) return { words: 'within', limit: high, isOff: false };
    return low === null ? null : { words: 'within', limit: low, isOff: false };
  });
  protected readonly staleFor = computed(() => {
    const sensor = this.current();
    return sensor?.latest && isStale(sensor, this.clock.now())
      ? durationWords(this.clock.now() - sensor.latest.t)
      : null;
  });
  /** How long the product takes from the tower's top to the sample tap [min]. */
  protected readonly rundownDelay = computed(() => {
    const alignment = this.current()?.version?.parameters.alignment;
    return alignment ? Math.round(alignment.deadTimeMinutes + alignment.residenceMinutes) : null;
  });
  protected readonly lostSince = computed(() => {
    const state = this.live.state();
    return state.kind === 'lost' ? this.plantTime.timeWithZone(state.since) : null;
  });

  constructor() {
    this.live.events.pipe(takeUntilDestroyed()).subscribe((event) => {
      const id = untracked(this.sensorId);
      if (event.type === 'sensor' && event.sensor.id === id) {
        if (untracked(() => this.misses(event.sensor.latest))) return this.readAgain();
        this.current.update((known) => known && { ...known, ...event.sensor });
        // The next move depends on this minute's pressure; the server works it out.
        this.detail.reload();
      }
      if (
        (event.type === 'sample' && id !== undefined && event.sensorIds.includes(id)) ||
        (event.type === 'note' && event.sensorId === id)
      )
        this.readAgain();
    });
    this.live.reconnected.pipe(takeUntilDestroyed()).subscribe(() => this.readAgain());
  }

  /** Whether minutes lie between the trend and this one: the server caught up with many, and said so only of the last. */
  private misses(latest: Estimate | null): boolean {
    const trend = this.shownTrend();
    const last = trend?.inferred.t.at(-1);
    if (!trend || !latest || last === undefined || this.window().kind !== 'live') return false;
    return latest.t - last > (trend.bucketMinutes + 1) * 60_000;
  }

  protected readAgain(): void {
    this.readings.update((count) => count + 1);
  }

  protected failure(error: unknown): string {
    return describeFailure(error).words;
  }

  protected fraction(value: number): string {
    return this.quantities.fraction(value, this.decimals());
  }
}
