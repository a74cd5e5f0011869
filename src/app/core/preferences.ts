import { DOCUMENT, Injectable, computed, effect, inject, signal } from '@angular/core';
import * as z from 'zod';
import { fractionUnits, pressureUnits, temperatureUnits } from '@shared/units';

/** What each person may choose, kept on this device only. */
const preferences = z.object({
  theme: z.enum(['system', 'day', 'night']).default('system'),
  temperature: z.enum(temperatureUnits).default('°C'),
  pressure: z.enum(pressureUnits).default('kPa'),
  pressureReference: z.enum(['absolute', 'gauge']).default('gauge'),
  fraction: z.enum(fractionUnits).default('mol %'),
});
export type PreferenceValues = z.infer<typeof preferences>;
export type Theme = PreferenceValues['theme'];
/** Units in which quantities are shown and typed. */
export type UnitChoice = Omit<PreferenceValues, 'theme'>;

const storageKey = 'dewmark.preferences';

@Injectable({ providedIn: 'root' })
export class Preferences {
  private readonly document = inject(DOCUMENT);
  private readonly values = signal(this.read());

  readonly theme = computed(() => this.values().theme);
  readonly units = computed<UnitChoice>(() => this.values());

  private readonly systemPrefersNight = signal(false);
  /** Whether night colours are in force, chosen or by the system. */
  readonly isNight = computed(() =>
    this.theme() === 'system' ? this.systemPrefersNight() : this.theme() === 'night',
  );

  constructor() {
    const query = this.document.defaultView?.matchMedia('(prefers-color-scheme: dark)');
    if (query) {
      this.systemPrefersNight.set(query.matches);
      query.addEventListener('change', (change) => this.systemPrefersNight.set(change.matches));
    }
    // The style sheet turns this attribute into a colour scheme; all colours follow from that.
    effect(() => this.document.documentElement.setAttribute('data-theme', this.isNight() ? 'night' : 'day'));
  }

  /** Changes some of the choices and keeps them for the next visit. */
  choose(change: Partial<PreferenceValues>): void {
    this.values.update((values) => ({ ...values, ...change }));
    try {
      this.document.defaultView?.localStorage.setItem(storageKey, JSON.stringify(this.values()));
    } catch {
      return; // storage is forbidden or full: the choice then lasts as long as the page
    }
  }

  private read(): PreferenceValues {
    try {
      const kept = this.document.defaultView?.localStorage.getItem(storageKey);
      return preferences.parse(JSON.parse(kept ?? '{}'));
    } catch {
      return preferences.parse({}); // storage is forbidden, or an older version wrote something else
    }
  }
}
