import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  output,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { debounceTime, map } from 'rxjs';
import { subjectKinds } from './entry-words';
import { periods, type ChosenPeriod } from './journal-period';

export interface JournalChoice extends ChosenPeriod {
  /** Kind of subject; empty for all. */
  readonly kind: string;
  readonly search: string;
}

/** Which entries to read: of which kind, from when, with which words. */
@Component({
  selector: 'app-journal-filter',
  imports: [MatFormField, MatInput, MatLabel, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form [formGroup]="form" role="search" aria-label="Filter the journal">
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>About</mat-label>
        <select matNativeControl formControlName="kind">
          <option value="">Everything</option>
          @for (subject of subjectKinds; track subject.kind) {
            <option [value]="subject.kind">{{ subject.label }}</option>
          }
        </select>
      </mat-form-field>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>When</mat-label>
        <select matNativeControl formControlName="period">
          @for (choice of periods; track choice.period) {
            <option [value]="choice.period">{{ choice.label }}</option>
          }
        </select>
      </mat-form-field>
      @if (isBetweenDays()) {
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>From</mat-label>
          <input matInput type="date" formControlName="firstDay" />
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>To</mat-label>
          <input matInput type="date" formControlName="lastDay" />
        </mat-form-field>
      }
      <mat-form-field class="search" appearance="outline" subscriptSizing="dynamic">
        <mat-label>Search</mat-label>
        <input matInput type="search" formControlName="search" maxlength="100" />
      </mat-form-field>
    </form>
  `,
  styles: `
    form {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      padding: 4px 0 8px;
    }
    mat-form-field {
      width: 172px;
    }
    .search {
      flex: 1;
      min-width: 160px;
      max-width: 340px;
    }
    @media (max-width: 719px) {
      mat-form-field {
        flex: 1 1 45%;
      }
      .search {
        flex-basis: 100%;
        max-width: none;
      }
    }
  `,
})
export class JournalFilter {
  private readonly forms = inject(NonNullableFormBuilder);

  readonly choice = input.required<JournalChoice>();
  readonly choiceChange = output<JournalChoice>();

  protected readonly subjectKinds = subjectKinds;
  protected readonly periods = periods;
  protected readonly form = this.forms.group({
    kind: '',
    period: this.forms.control<JournalChoice['period']>('week'),
    firstDay: '',
    lastDay: '',
    search: '',
  });
  protected readonly isBetweenDays = signal(false);

  constructor() {
    // A choice that comes from the address goes into the fields.
    effect(() => {
      const choice = this.choice();
      untracked(() => {
        const typed = this.form.getRawValue();
        // A space typed at the end of a word is no search of its own, and not to be taken away under the hand.
        const search = typed.search.trim() === choice.search ? typed.search : choice.search;
        this.form.setValue({ ...choice, search }, { emitEvent: false });
        this.isBetweenDays.set(choice.period === 'days');
      });
    });
    this.form.controls.period.valueChanges
      .pipe(takeUntilDestroyed())
      .subscribe((period) => this.isBetweenDays.set(period === 'days'));
    this.form.valueChanges
      .pipe(
        debounceTime(300),
        map(() => this.form.getRawValue()),
        takeUntilDestroyed(),
      )
      .subscribe((choice) => this.choiceChange.emit({ ...choice, search: choice.search.trim() }));
  }
}
