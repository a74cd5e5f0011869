import { Injectable, computed, inject } from '@angular/core';
import { degreesPerKelvin, fractionFactor, pascalsIn, temperatureFrom, temperatureTo } from '@shared/units';
import { Preferences } from '../core/preferences';
import { SessionStore } from '../core/session';
import { formatNumber } from './numbers';

/**
 * Canonical quantities in the units the person likes, and back. All methods read signals, so that a `computed` or template
 * that uses them follows a change of unit. Texts come without their unit: a label stands beside them.
 */
@Injectable({ providedIn: 'root' })
export class Quantities {
  private readonly preferences = inject(Preferences);
  private readonly session = inject(SessionStore);
  private readonly units = this.preferences.units;

  readonly fractionUnit = computed(() => this.units().fraction);
  readonly temperatureUnit = computed(() => this.units().temperature);
  /** Of a difference of temperatures: `K`, or `°F` of the same size as its degree. */
  readonly temperatureChangeUnit = computed(() => (this.units().temperature === '°C' ? 'K' : '°F'));
  /** Says what the pressure counts from: `kPa gauge`, `bar abs`. */
  readonly pressureUnit = computed(
    () => `${this.units().pressure} ${this.units().pressureReference === 'gauge' ? 'gauge' : 'abs'}`,
  );
  readonly pressureChangeUnit = computed(() => this.units().pressure);

  /** A mole fraction as shown, number only. */
  toFraction(moleFraction: number): number {
    return moleFraction * fractionFactor(this.units().fraction);
  }

  /** The mole fraction of what was typed in the shown unit. */
  fromFraction(shown: number): number {
    return shown / fractionFactor(this.units().fraction);
  }

  toTemperature(kelvin: number): number {
    return temperatureTo(kelvin, this.units().temperature);
  }

  fromTemperature(shown: number): number {
    return temperatureFrom(shown, this.units().temperature);
  }

  toTemperatureChange(kelvin: number): number {
    return kelvin * degreesPerKelvin(this.units().temperature);
  }

  /** @param pascal absolute */
  toPressure(pascal: number): number {
    return (pascal - this.datum()) / pascalsIn(this.units().pressure);
  }

  /** @returns Pa absolute */
  fromPressure(shown: number): number {
    return shown * pascalsIn(this.units().pressure) + this.datum();
  }

  toPressureChange(pascal: number): number {
    return pascal / pascalsIn(this.units().pressure);
  }

  /** `1.62`; give `decimals` where several figures stand together. */
  fraction(moleFraction: number, decimals = this.fractionDecimals(moleFraction)): string {
    return formatNumber(this.toFraction(moleFraction), decimals);
  }

  /** `+0.09`: a change of a mole fraction. */
  fractionChange(change: number, decimals = this.fractionDecimals(change)): string {
    return formatNumber(this.toFraction(change), decimals, true);
  }

  temperature(kelvin: number, decimals = 1): string {
    return formatNumber(this.toTemperature(kelvin), decimals);
  }

  temperatureChange(kelvin: number, decimals = 1): string {
    return formatNumber(this.toTemperatureChange(kelvin), decimals, true);
  }

  /** @param pascal absolute */
  pressure(pascal: number, decimals = this.pressureDecimals()): string {
    return formatNumber(this.toPressure(pascal), decimals);
  }

  pressureChange(pascal: number, decimals = this.pressureDecimals()): string {
    return formatNumber(this.toPressureChange(pascal), decimals, true);
  }

  /** Decimals that show a hundredth of `reference` or better: the limit of a product, or the value itself. */
  fractionDecimals(reference: number): number {
    const shown = Math.abs(this.toFraction(reference));
    if (this.units().fraction === 'ppm') return shown >= 100 ? 0 : shown >= 1 ? 1 : 2;
    return shown >= 10 ? 1 : shown >= 0.1 ? 2 : 4;
  }

  /** A tenth of a kilopascal, about what a good transmitter tells apart. */
  private pressureDecimals(): number {
    return { kPa: 1, bar: 3, psi: 2 }[this.units().pressure];
  }

  private datum(): number {
    return this.units().pressureReference === 'gauge' ? this.session.site().barometricPressure : 0;
  }
}
