import { Injectable, signal } from '@angular/core';

export interface Notice {
  readonly text: string;
  /** Whether it needs a person: announced at once, and stays until closed. */
  readonly urgent: boolean;
}

/** The one line under the header in which a screen reports what was done or what failed. */
@Injectable({ providedIn: 'root' })
export class Notices {
  private readonly shown = signal<Notice | null>(null);
  readonly current = this.shown.asReadonly();

  /** Says that something was done. */
  tell(text: string): void {
    this.shown.set({ text, urgent: false });
  }

  /** Says that something failed and what can be done. */
  warn(text: string): void {
    this.shown.set({ text, urgent: true });
  }

  close(): void {
    this.shown.set(null);
  }
}
