import { linkedSignal, type Signal } from '@angular/core';
import type { Outcome } from './desk-answer';

/** An answer as it stands on the page: while the present question has none, the last good one stays, marked as old. */
export interface Shown<T> {
  readonly value: T | null;
  readonly isOld: boolean;
  /** Why the present question has no answer; empty when it has one. */
  readonly words: string;
}

/** The answer to show. Read it on every change, as a template does: what nobody looked at is not remembered. */
export function lastGood<T>(outcome: () => Outcome<T>): Signal<Shown<T>> {
  return linkedSignal<Outcome<T>, Shown<T>>({
    source: outcome,
    computation: (present, before) =>
      present.kind === 'answered'
        ? { value: present.value, isOld: false, words: '' }
        : { value: before?.value.value ?? null, isOld: true, words: present.words },
  }).asReadonly();
}
