import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  model,
  signal,
  untracked,
  type WritableSignal,
} from '@angular/core';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioButton, MatRadioGroup } from '@angular/material/radio';
import { PlantTime, zoneName, type ParsedPlantTime } from '../core/plant-time';

/** Nothing here is older. */
const earliestDate = '2000-01-01';

/** A date and time on the plant's wall clock. An hour the clock skips or shows twice is asked about, not guessed. */
@Component({
  selector: 'app-plant-moment',
  imports: [MatFormField, MatInput, MatLabel, MatRadioButton, MatRadioGroup],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'group', '[attr.aria-label]': 'label()' },
  template: `
    <p class="name">
      {{ label() }} <span class="soft">({{ zone() }})</span>
    </p>
    <div class="fields">
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Date</mat-label>
        <input matInput type="date" max="9999-12-31" [value]="date()" (input)="type(date, $event)" />
      </mat-form-field>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Time</mat-label>
        <input matInput type="time" [value]="time()" (input)="type(time, $event)" />
      </mat-form-field>
    </div>
    @switch (parsed()?.kind) {
      @case ('gap') {
        <p class="problem" role="alert">
          The clocks went forward over that time: it never was. Choose another.
        </p>
      }
      @case ('twice') {
        <p>The clocks went back: that time came twice. Which is meant?</p>
        <mat-radio-group aria-label="Which of the two" [value]="which()" (change)="which.set($event.value)">
          <mat-radio-button value="earlier">the first ({{ names()?.earlier }})</mat-radio-button>
          <mat-radio-button value="later">the second ({{ names()?.later }})</mat-radio-button>
        </mat-radio-group>
      }
    }
    @if (problem(); as words) {
      <p class="problem">{{ words }}</p>
    } @else if (hint(); as words) {
      <p class="soft hint">{{ words }}</p>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .name {
      margin-bottom: 4px;
      font-weight: 500;
    }
    .fields {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
    }
    mat-form-field {
      width: 160px;
    }
    .hint {
      margin-top: 4px;
      font-size: 12px;
    }
    .problem {
      color: var(--urgent);
    }
  `,
})
export class PlantMoment {
  private readonly plantTime = inject(PlantTime);

  readonly label = input.required<string>();
  /** What is wrong with the moment itself, said beneath. */
  readonly problem = input('');
  /** Said beneath while nothing is wrong. */
  readonly hint = input('');
  /** UTC milliseconds; NaN while it is not one moment. */
  readonly moment = model.required<number>();

  protected readonly date = signal('');
  protected readonly time = signal('');
  protected readonly which = signal<'earlier' | 'later' | null>(null);
  protected readonly parsed = computed((): ParsedPlantTime | null => {
    // While its year is typed, a date field says 0002, 0020, 0202.
    if (this.date() < earliestDate) return null;
    try {
      return this.plantTime.parse(this.date(), this.time());
    } catch {
      return null; // not a whole date and time yet
    }
  });
  /** What the fields say [UTC ms]; NaN while they do not say one moment. */
  private readonly typedMoment = computed(() => {
    const parsed = this.parsed();
    const which = this.which();
    if (parsed?.kind === 'ok') return parsed.t;
    return parsed?.kind === 'twice' && which ? parsed[which] : Number.NaN;
  });
  protected readonly names = computed(() => {
    const parsed = this.parsed();
    return parsed?.kind === 'twice'
      ? {
          earlier: zoneName(parsed.earlier, this.plantTime.zone),
          later: zoneName(parsed.later, this.plantTime.zone),
        }
      : null;
  });
  protected readonly zone = computed(() =>
    Number.isNaN(this.moment()) ? this.plantTime.zone : zoneName(this.moment(), this.plantTime.zone),
  );

  constructor() {
    // From outside: a moment set by the form is shown. One that comes back from the fields changes nothing in them.
    effect(() => {
      const moment = this.moment();
      if (Number.isNaN(moment) || Object.is(moment, untracked(this.typedMoment))) return;
      const { date, time } = this.plantTime.wallClock(moment);
      this.date.set(date);
      this.time.set(time);
      const parsed = untracked(this.parsed);
      this.which.set(parsed?.kind !== 'twice' ? null : moment < parsed.later ? 'earlier' : 'later');
    });
    // From the fields: what was typed becomes a moment.
    effect(() => {
      const t = this.typedMoment();
      if (!Object.is(t, untracked(this.moment))) this.moment.set(t);
    });
  }

  protected type(field: WritableSignal<string>, event: Event): void {
    field.set((event.target as HTMLInputElement).value);
    // Which of two was meant is asked anew.
    this.which.set(null);
  }
}
