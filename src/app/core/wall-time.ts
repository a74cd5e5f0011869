import { InjectionToken } from '@angular/core';

/** This device's own time [UTC ms]. Only `Clock` reads it: everything else follows the server through `Clock`. */
export const wallTime = new InjectionToken<() => number>('wallTime', {
  providedIn: 'root',
  factory: () => () => Date.now(),
});
