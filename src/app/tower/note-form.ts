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

/** A note on the trend, at this moment, for the next shift to read. */
@Component({
  selector: 'app-note-form',
  imports: [MatButton, MatFormField, MatInput, MatLabel, ReactiveFormsModule],
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
      gap: 6px;
    }
    mat-form-field {
      width: 100%;
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
  readonly written = output();

  protected readonly text = new FormControl('', { nonNullable: true });
  protected readonly problem = signal('');
  protected readonly isSending = signal(false);

  protected async write(): Promise<void> {
    const text = this.text.value.trim();
    if (text === '') return this.problem.set('Write the note first.');
    this.isSending.set(true);
    this.problem.set('');
    try {
      await firstValueFrom(
        this.http.post(notesPath, { sensorId: this.sensorId(), t: this.clock.now(), text }),
      );
      this.text.reset();
      this.notices.tell('The note stands on the trend and in the Journal.');
      this.written.emit();
    } catch (error) {
      // What was written stays in the field.
      const failure = describeFailure(error);
      this.problem.set(`${failure.title}. ${failure.detail}`);
    } finally {
      this.isSending.set(false);
    }
  }
}
