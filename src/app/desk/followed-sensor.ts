import { HttpClient } from '@angular/common/http';
import { Injectable, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import {
  EMPTY,
  Subject,
  catchError,
  filter,
  map,
  merge,
  of,
  startWith,
  switchMap,
  type Observable,
} from 'rxjs';
import { samplePage, samplesPath, type Sample } from '@shared/api/samples';
import { sensorDetail, sensorsPath, type Estimate, type SensorDetail } from '@shared/api/sensors';
import { describeFailure, type ApiFailure } from '../core/api-error';
import { Live } from '../core/live';

/** What is known of the sensor whose slate and readings the desk follows. */
export type Following =
  | { readonly kind: 'none' }
  | { readonly kind: 'reading'; readonly sensorId: string }
  | { readonly kind: 'failed'; readonly sensorId: string; readonly failure: ApiFailure }
  | {
      readonly kind: 'following';
      readonly sensor: SensorDetail;
      /** The newest minute, renewed by the live stream. */
      readonly latest: Estimate | null;
      /** Composition of the sample the sensor rests on; null where it rests on its set-up, or the sample was not found. */
      readonly sampled: Sample['fractions'] | null;
    };

/** Follows one sensor: reads it once, then listens to the live stream. */
@Injectable()
export class FollowedSensor {
  private readonly http = inject(HttpClient);
  private readonly live = inject(Live);

  private readonly wanted = signal<string | null>(null);
  private readonly again = new Subject<void>();
  private readonly current = signal<Following>({ kind: 'none' });
  readonly state = this.current.asReadonly();
  readonly sensorId = computed(() => this.wanted());

  constructor() {
    toObservable(this.wanted)
      .pipe(
        switchMap((sensorId) => (sensorId === null ? EMPTY : this.follow(sensorId))),
        takeUntilDestroyed(),
      )
      .subscribe((following) => this.current.set(following));
  }

  /** Follows this sensor from now on; null follows none. */
  follows(sensorId: string | null): void {
    this.wanted.set(sensorId);
    this.current.set(sensorId === null ? { kind: 'none' } : { kind: 'reading', sensorId });
  }

  retry(): void {
    this.again.next();
  }

  private follow(sensorId: string): Observable<Following> {
    return merge(this.again, this.live.reconnected).pipe(
      startWith(undefined),
      switchMap(() => merge(this.read(sensorId), this.listen(sensorId))),
    );
  }

  private read(sensorId: string): Observable<Following> {
    return this.http.get(`${sensorsPath}/${sensorId}`).pipe(
      switchMap((answer) => {
        const sensor = sensorDetail.parse(answer);
        return this.readSample(sensor).pipe(
          map((sampled): Following => ({ kind: 'following', sensor, latest: sensor.latest, sampled })),
        );
      }),
      catchError((error: unknown) =>
        of({ kind: 'failed', sensorId, failure: describeFailure(error) } as const),
      ),
    );
  }

  private readSample(sensor: SensorDetail): Observable<Sample['fractions'] | null> {
    const sampleId = sensor.latest?.baseSampleId ?? null;
    if (sampleId === null) return of(null);
    const params = { towerId: sensor.towerId, state: 'used', limit: 200 };
    return this.http
      .get(samplesPath, { params })
      .pipe(
        map((answer) => samplePage.parse(answer).items.find(({ id }) => id === sampleId)?.fractions ?? null),
      );
  }

  /** The newest minutes; a sample that changed the slate is read anew. */
  private listen(sensorId: string): Observable<Following> {
    return this.live.events.pipe(
      filter((event) => event.type === 'sensor' && event.sensor.id === sensorId),
      switchMap((event) => {
        const before = this.current();
        if (before.kind !== 'following' || event.type !== 'sensor') return EMPTY;
        const { latest } = event.sensor;
        const isSameSlate =
          latest?.baseSampleId === before.latest?.baseSampleId &&
          latest?.versionId === before.latest?.versionId;
        return isSameSlate ? of({ ...before, latest }) : this.read(sensorId);
      }),
    );
  }
}
