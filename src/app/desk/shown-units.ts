import { Injectable, computed, inject } from '@angular/core';
import { Quantities } from '../ui/quantities';
import type { ShownUnits } from './plot-frame';

/** The units that plots and tables are written in: those the person likes. */
@Injectable({ providedIn: 'root' })
export class ShownUnitsOfPerson {
  private readonly quantities = inject(Quantities);

  readonly units = computed((): ShownUnits => ({
    temperature: (kelvin) => this.quantities.toTemperature(kelvin),
    temperatureUnit: this.quantities.temperatureUnit(),
    pressure: (pascal) => this.quantities.toPressure(pascal),
    pressureUnit: this.quantities.pressureUnit(),
    fraction: (fraction) => this.quantities.toFraction(fraction),
    fractionUnit: this.quantities.fractionUnit(),
  }));
}
