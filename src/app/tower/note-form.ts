import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { firstValueFrom } from 'rxjs';
import { notesPath } from '@shared/api/journal';
import { describeFailure } from '../core/api-error';
import { Clock } from '../core/clock';
import { Notices } from '../core/notices';
import { SessionStore } from '../core/session';
import { PlantMoment } from '../ui/plant-moment';

/** A note on the trend, at this moment or another, for the next shift to read. */
@Component({
  selector: 'app-note-form',
  imports: [MatButton, MatFormField, MatInput, MatLabel, PlantMoment, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card' },
  template: `
    <h2>Note</h2>
    @if (session.may('writeNotes')) {
      <form (submit)="$event.preventDefault(); write()">
        <mat-form-field appearance="outline">
          <mat-label>What happened?</mat-label>
          <textarea matInput [formControl]="text" rows="2" maxlength="1000"></textarea>
        </mat-form-field>
        @if (isElsewhen()) {
          <app-plant-moment label="When" [(moment)]="moment" />
        } @else {
          <p class="soft small">
            It will stand at this minute.
            <button type="button" class="otherwise" (click)="chooseTime()">Choose another time</button>
          </p>
        }
        @if (problem(); as words) {
          <p role="alert" class="problem">{{ words }}</p>
        }
        <button matButton="outlined" type="submit" [disabled]="isSending()">Leave a note</button>
      </form>
    } @else {
      <p class="soft">Your role does not write notes.</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
    }
    form > mat-form-field {
      width: 100%;
    }
    app-plant-moment,
    .small {
      margin-bottom: 10px;
    }
    .small {
      font-size: 12px;
    }
    .otherwise {
      min-height: 24px;
      padding: 0;
      border: 0;
      background: none;
      color: var(--inferred);
      font: inherit;
      text-decoration: underline;
      cursor: pointer;
    }
    .problem {
      margin-bottom: 6px;
      color: var(--urgent);
    }
  `,
})
export class NoteForm {
  private readonly http = inject(HttpClient);
  private readonly clock = inject(Clock);
  private readonly notices = inject(Notices);
  protected readonly session = inject(SessionStore);

  readonly sensorId = input.required<string>();
  /** What another time begins from: the end of the stretch that is looked at [UTC ms]. */
  readonly lookedAt = input.required<number>();
  readonly written = output();

  protected readonly text = new FormControl('', { nonNullable: true });
  protected readonly isElsewhen = signal(false);
  protected readonly moment = signal(Number.NaN);
  protected readonly problem = signal('');
  protected readonly isSending = signal(false);

  protected chooseTime(): void {
    this.moment.set(Math.min(this.lookedAt(), this.clock.minute()));
    this.isElsewhen.set(true);
  }

  protected async write(): Promise<void> {
    const text = this.text.value.trim();
    const t = this.isElsewhen() ? this.moment() : this.clock.now();
    if (text === '') return this.problem.set('Write the note first.');
    if (Number.isNaN(t)) return this.problem.set('Say when it was.');
    this.isSending.set(true);
    this.problem.set('');
    try {
      await firstValueFrom(this.http.post(notesPath, { sensorId: this.sensorId(), t, text }));
      this.text.reset();
      this.isElsewhen.set(false);
      this.notices.tell('The note stands on the trend and in the Journal.');
      this.written.emit();
    } catch (error) {
      // What was written stays in the field.
      this.problem.set(describeFailure(error).words);
    } finally {
      this.isSending.set(false);
    }
  }
}
