import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { mdiLanDisconnect } from '@mdi/js';
import { sensorList, sensorsPath, type Sensor } from '@shared/api/sensors';
import { Clock } from '../core/clock';
import { Live } from '../core/live';
import { PlantTime } from '../core/plant-time';
import { CautionText } from '../ui/caution-text';
import { EmptyState } from '../ui/empty-state';
import { ErrorState } from '../ui/error-state';
import { Glyph } from '../ui/glyph';
import { LoadingState } from '../ui/loading-state';
import { assess, byNeed, summaryWords, type AssessedSensor } from '../ui/attention';
import { BoardRow } from './board-row';

/** Every product at a glance, whoever needs a look first at the top. */
@Component({
  selector: 'app-board',
  imports: [BoardRow, CautionText, EmptyState, ErrorState, Glyph, LoadingState],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board.html',
  styleUrl: './board.scss',
})
export class Board {
  private readonly live = inject(Live);
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);

  protected readonly mdiLanDisconnect = mdiLanDisconnect;
  protected readonly sensors = httpResource(() => sensorsPath, { parse: sensorList.parse });

  /** As read, then as the stream changes it; what was read stays when reading it again fails. */
  private readonly current = linkedSignal<readonly Sensor[] | undefined, readonly Sensor[] | undefined>({
    source: () => (this.sensors.hasValue() ? this.sensors.value() : undefined),
    computation: (read, previous) => read ?? previous?.value,
  });
  /** Often enough for what turns stale, seldom enough to leave rows alone most of the time. */
  private readonly quarterMinute = computed(() => Math.floor(this.clock.now() / 15_000) * 15_000);
  private readonly assessed = computed(() =>
    this.current()?.map((sensor) => ({ sensor, attention: assess(sensor, this.quarterMinute()) })),
  );

  /** While a row has the keyboard's focus, rows keep their places: moving it would lose the focus. */
  protected readonly hasFocus = signal(false);
  protected readonly rows = linkedSignal<
    { rows: readonly AssessedSensor[] | undefined; isHeld: boolean },
    readonly AssessedSensor[] | undefined
  >({
    source: () => ({ rows: this.assessed(), isHeld: this.hasFocus() }),
    computation: ({ rows, isHeld }, previous) =>
      rows && (isHeld && previous?.value ? inOrderOf(previous.value, rows) : [...rows].sort(byNeed)),
  });
  protected readonly summary = computed(() => summaryWords(this.rows() ?? []));
  /** Said aloud when a product's need of a look changes. */
  protected readonly announcement = linkedSignal<readonly AssessedSensor[] | undefined, string>({
    source: () => this.assessed(),
    computation: (rows, previous) =>
      changesInWords(previous?.source ?? [], rows ?? []) || (previous?.value ?? ''),
  });
  protected readonly lostSince = computed(() => {
    const state = this.live.state();
    return state.kind === 'lost' ? this.plantTime.timeWithZone(state.since) : null;
  });

  constructor() {
    this.live.events.pipe(takeUntilDestroyed()).subscribe((event) => {
      if (event.type === 'sensor') this.take(event.sensor);
    });
    this.live.reconnected.pipe(takeUntilDestroyed()).subscribe(() => this.sensors.reload());
  }

  private take(sensor: Sensor): void {
    const known = this.current();
    if (!known) return;
    const isKnown = known.some(({ id }) => id === sensor.id);
    this.current.set(
      isKnown ? known.map((row) => (row.id === sensor.id ? sensor : row)) : [...known, sensor],
    );
  }
}

function inOrderOf(
  previous: readonly AssessedSensor[],
  rows: readonly AssessedSensor[],
): readonly AssessedSensor[] {
  const place = new Map(previous.map((row, index) => [row.sensor.id, index]));
  const placeOf = (row: AssessedSensor) => place.get(row.sensor.id) ?? previous.length;
  return [...rows].sort((a, b) => placeOf(a) - placeOf(b));
}

function changesInWords(before: readonly AssessedSensor[], after: readonly AssessedSensor[]): string {
  const known = new Map(before.map((row) => [row.sensor.id, row.attention.kind]));
  return after
    .filter(({ sensor, attention }) => known.has(sensor.id) && known.get(sensor.id) !== attention.kind)
    .map(
      ({ sensor, attention }) =>
        `${sensor.towerName}, ${sensor.name}: ${attention.words || 'all well again'}.`,
    )
    .join(' ');
}
