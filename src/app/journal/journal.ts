import { HttpClient, httpResource } from '@angular/common/http';
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
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { debounceTime, filter, firstValueFrom, merge } from 'rxjs';
import { journalPage, journalPath, type JournalEntry } from '@shared/api/journal';
import { describeFailure } from '../core/api-error';
import { Clock } from '../core/clock';
import { Live } from '../core/live';
import { Notices } from '../core/notices';
import { PlantTime } from '../core/plant-time';
import { EmptyState } from '../ui/empty-state';
import { ErrorState } from '../ui/error-state';
import { LoadingState } from '../ui/loading-state';
import { JournalEntryLine } from './journal-entry-line';
import { JournalFilter, type JournalChoice } from './journal-filter';
import { periodBounds, periods, type Period } from './journal-period';

interface OlderPages {
  readonly items: readonly JournalEntry[];
  readonly next: string | null;
}

const pageLength = 100;

/** The record of who changed what, when, from what to what, and why; notes stand among the rest. */
@Component({
  selector: 'app-journal',
  imports: [EmptyState, ErrorState, JournalEntryLine, JournalFilter, LoadingState, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './journal.html',
  styleUrl: './journal.scss',
})
export class Journal {
  private readonly http = inject(HttpClient);
  private readonly router = inject(Router);
  private readonly clock = inject(Clock);
  private readonly live = inject(Live);
  private readonly notices = inject(Notices);
  private readonly plantTime = inject(PlantTime);

  /** The filter stands in the address, so that it can be sent on and gone back to. */
  readonly kind = input<string>();
  readonly period = input<string>();
  readonly from = input<string>();
  readonly to = input<string>();
  readonly search = input<string>();

  protected readonly choice = computed<JournalChoice>(() => ({
    kind: this.kind() ?? '',
    period: knownPeriod(this.period()),
    firstDay: this.from() ?? '',
    lastDay: this.to() ?? '',
    search: this.search() ?? '',
  }));
  /** Of the request; the present moment is taken once, lest each second asked again. */
  private readonly params = computed(() => {
    const { kind, search, ...period } = this.choice();
    const bounds = periodBounds(period, untracked(this.clock.now), (date) => this.dayStart(date));
    return { ...bounds, ...(kind && { kind }), ...(search && { search }), limit: pageLength };
  });
  protected readonly newest = httpResource(() => ({ url: journalPath, params: this.params() }), {
    parse: journalPage.parse,
  });
  /** Older pages asked for since the newest one was read. */
  private readonly older = linkedSignal<unknown, OlderPages | null>({
    source: () => (this.newest.hasValue() ? this.newest.value() : undefined),
    computation: () => null,
  });

  protected readonly isReadingOlder = signal(false);
  protected readonly hasNewer = signal(false);
  protected readonly isFiltered = computed(() => {
    const { kind, search, period } = this.choice();
    return kind !== '' || search !== '' || period !== 'all';
  });
  private readonly entries = computed(() =>
    this.newest.hasValue() ? [...this.newest.value().items, ...(this.older()?.items ?? [])] : [],
  );
  protected readonly next = computed(() => {
    const older = this.older();
    if (older) return older.next;
    return this.newest.hasValue() ? this.newest.value().next : null;
  });
  protected readonly days = computed(() => byDay(this.entries(), (t) => this.plantTime.dayWithZone(t)));

  constructor() {
    const changes = this.live.events.pipe(
      filter((event) => event.type !== 'beat' && event.type !== 'sensor'),
    );
    // One sample brings several events; the record is read again once they are through.
    merge(changes, this.live.reconnected)
      .pipe(debounceTime(500), takeUntilDestroyed())
      .subscribe(() => (this.older() ? this.hasNewer.set(true) : this.newest.reload()));
  }

  protected choose(choice: JournalChoice): void {
    const days =
      choice.period === 'days' ? { from: choice.firstDay, to: choice.lastDay } : { from: '', to: '' };
    const asked = {
      kind: choice.kind,
      period: choice.period === defaultPeriod ? '' : choice.period,
      ...days,
      search: choice.search,
    };
    const queryParams = Object.fromEntries(Object.entries(asked).map(([key, value]) => [key, value || null]));
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected showNewer(): void {
    this.hasNewer.set(false);
    this.older.set(null);
    this.newest.reload();
  }

  protected async readOlder(): Promise<void> {
    const cursor = this.next();
    if (cursor === null || this.isReadingOlder()) return;
    this.isReadingOlder.set(true);
    const asked = this.params();
    try {
      const page = journalPage.parse(
        await firstValueFrom(this.http.get(journalPath, { params: { ...asked, cursor } })),
      );
      // Under another filter by now, these entries are not what is shown.
      if (asked === this.params())
        this.older.update((older) => ({ items: [...(older?.items ?? []), ...page.items], next: page.next }));
    } catch (error) {
      this.notices.warn(`Older entries could not be read. ${describeFailure(error).words}`);
    } finally {
      this.isReadingOlder.set(false);
    }
  }

  private dayStart(date: string): number | null {
    if (!/^\d{4}-\d{2}-\d{2}$/.test(date) || Number.isNaN(Date.parse(date))) return null;
    const noon = this.plantTime.parse(date, '12:00');
    return noon.kind === 'ok' ? this.plantTime.dayStart(noon.t) : null;
  }
}

const defaultPeriod: Period = 'week';

function knownPeriod(asked: string | undefined): Period {
  return periods.find(({ period }) => period === asked)?.period ?? defaultPeriod;
}

function byDay(
  entries: readonly JournalEntry[],
  dayOf: (t: number) => string,
): { day: string; entries: JournalEntry[] }[] {
  const days: { day: string; entries: JournalEntry[] }[] = [];
  for (const entry of entries) {
    const day = dayOf(entry.t);
    const last = days.at(-1);
    if (last?.day === day) last.entries.push(entry);
    else days.push({ day, entries: [entry] });
  }
  return days;
}
