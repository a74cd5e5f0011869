import { HttpClient, httpResource } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatOption, MatSelect } from '@angular/material/select';
import { firstValueFrom } from 'rxjs';
import { samplePage, samplesPath, type Sample, type SampleOutcome } from '@shared/api/samples';
import {
  sensorDetail,
  sensorList,
  sensorsPath,
  towerList,
  towersPath,
  type SampleState,
  type SensorDetail,
} from '@shared/api/sensors';
import { describeFailure } from '../core/api-error';
import { Live } from '../core/live';
import { Notices } from '../core/notices';
import { SessionStore } from '../core/session';
import { EmptyState } from '../ui/empty-state';
import { ErrorState } from '../ui/error-state';
import { LoadingState } from '../ui/loading-state';
import { SampleEffect } from './sample-effect';
import { SampleEntry, type SamplePlace } from './sample-entry';
import { SampleRow } from './sample-row';

interface SampleList {
  readonly items: readonly Sample[];
  readonly next: string | null;
}

/** The laboratory's results: one entered, what it changed, and those before it. */
@Component({
  selector: 'app-samples',
  imports: [
    EmptyState,
    ErrorState,
    LoadingState,
    MatButton,
    MatFormField,
    MatLabel,
    MatOption,
    MatSelect,
    SampleEffect,
    SampleEntry,
    SampleRow,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './samples.html',
  styleUrl: './samples.scss',
})
export class Samples {
  private readonly http = inject(HttpClient);
  private readonly notices = inject(Notices);
  protected readonly session = inject(SessionStore);

  /** Of the address: /samples?tower= */
  readonly tower = input<string>();

  protected readonly states: readonly SampleState[] = ['used', 'held', 'rejected', 'pending'];
  protected readonly towers = httpResource(() => towersPath, { parse: towerList.parse });
  /** Versions of the sensors, for the slate each sample point needs. */
  private readonly details = signal<readonly SensorDetail[] | undefined>(undefined);
  protected readonly placesError = signal<unknown>(undefined);
  protected readonly places = computed((): readonly SamplePlace[] | undefined => {
    const details = this.details();
    if (!details || !this.towers.hasValue()) return undefined;
    return this.towers.value().flatMap((tower) =>
      (['overhead', 'bottoms'] as const).flatMap((point) => {
        const sensors = details.filter(
          (sensor) => sensor.towerId === tower.id && sensor.point === point && sensor.version,
        );
        return sensors.length > 0 ? [{ tower, point, sensors }] : [];
      }),
    );
  });

  protected readonly towerFilter = linkedSignal<string>(() => this.tower() ?? '');
  protected readonly stateFilter = signal<SampleState | ''>('');
  private readonly filter = computed(() => `${this.towerFilter()} ${this.stateFilter()}`);
  private readonly readings = signal(0);
  protected readonly page = httpResource(
    () => {
      this.readings();
      const [towerId, state] = [this.towerFilter(), this.stateFilter()];
      return {
        url: samplesPath,
        params: { limit: 30, ...(towerId ? { towerId } : {}), ...(state ? { state } : {}) },
      };
    },
    { parse: samplePage.parse },
  );
  /** The first page and the older ones fetched behind it; stays while the first is read again, not when another is asked for. */
  protected readonly list = linkedSignal<
    { read: SampleList | undefined; filter: string },
    SampleList | undefined
  >({
    source: () => ({ read: this.page.hasValue() ? this.page.value() : undefined, filter: this.filter() }),
    computation: ({ read, filter }, previous) =>
      read ?? (previous?.source.filter === filter ? previous.value : undefined),
  });
  protected readonly outcome = signal<SampleOutcome | null>(null);
  protected readonly isReadingOlder = signal(false);

  constructor() {
    const live = inject(Live);
    live.events.pipe(takeUntilDestroyed()).subscribe((event) => {
      if (event.type === 'sample') this.readAgain();
    });
    live.reconnected.pipe(takeUntilDestroyed()).subscribe(() => this.readAgain());
    void this.readPlaces();
  }

  protected async readPlaces(): Promise<void> {
    this.placesError.set(undefined);
    try {
      const all = sensorList.parse(await firstValueFrom(this.http.get(sensorsPath)));
      this.details.set(
        await Promise.all(
          all.map(async (sensor) =>
            sensorDetail.parse(await firstValueFrom(this.http.get(`${sensorsPath}/${sensor.id}`))),
          ),
        ),
      );
    } catch (error) {
      this.placesError.set(error);
    }
  }

  protected take(outcome: SampleOutcome): void {
    this.outcome.set(outcome);
    this.readAgain();
  }

  protected readAgain(): void {
    this.readings.update((count) => count + 1);
  }

  protected async readOlder(): Promise<void> {
    const known = this.list();
    if (!known?.next) return;
    const filter = this.filter();
    this.isReadingOlder.set(true);
    try {
      const params = {
        limit: 30,
        cursor: known.next,
        ...(this.towerFilter() ? { towerId: this.towerFilter() } : {}),
        ...(this.stateFilter() ? { state: this.stateFilter() } : {}),
      };
      const older = samplePage.parse(await firstValueFrom(this.http.get(samplesPath, { params })));
      // Another list may have been asked for meanwhile, or this one read again from its beginning.
      if (this.filter() === filter && this.list()?.next === known.next)
        this.list.set({ items: [...known.items, ...older.items], next: older.next });
    } catch (error) {
      const failure = describeFailure(error);
      this.notices.warn(`Older samples could not be read. ${failure.words}`);
    } finally {
      this.isReadingOlder.set(false);
    }
  }

  /** Names and limits of the products a sample speaks of. */
  protected sensorsOf(sample: Sample): readonly SensorDetail[] {
    return (
      this.details()?.filter(
        (sensor) => sensor.towerId === sample.towerId && sensor.point === sample.point,
      ) ?? []
    );
  }

  protected failure(error: unknown): string {
    return describeFailure(error).words;
  }
}
