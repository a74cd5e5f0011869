import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { componentById } from '@shared/vle/components';
import { formatNumber, noNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { DeskState } from './desk-state';
import { answerNames } from './desk-words';

/** Feed, liquid and vapour of the state looked at, with K-values and partial pressures. */
@Component({
  selector: 'app-phases-table',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './phases-table.html',
  styleUrl: './phases-table.scss',
})
export class PhasesTable {
  protected readonly state = inject(DeskState);
  protected readonly quantities = inject(Quantities);

  protected readonly title = computed(() => `Phases ${answerNames[this.state.answer()]}`);
  protected readonly isOld = computed(() => this.state.phases().isOld || this.state.isUnfinished());
  protected readonly words = computed(() => this.state.phases().words);
  /** Where the state lies, in a line. */
  protected readonly place = computed(() => {
    const result = this.state.phases().value?.result;
    if (!result) return '';
    const temperature = `${this.quantities.temperature(result.temperature, 2)} ${this.quantities.temperatureUnit()}`;
    const pressure = `${this.quantities.pressure(result.pressure)} ${this.quantities.pressureUnit()}`;
    return `${temperature}, ${pressure}, ${formatNumber(100 * result.vapourFraction, 2)} mol % vaporised`;
  });
  /** dT/dP along the line, where the state lies on one. */
  protected readonly slope = computed(() => {
    const result = this.state.phases().value?.result;
    if (!result || !('slope' in result) || typeof result.slope !== 'number' || Number.isNaN(result.slope))
      return '';
    const perUnit = this.quantities.toTemperatureChange(result.slope) / this.quantities.toPressureChange(1);
    return `dT/dP ${perUnit.toPrecision(3)} ${this.quantities.temperatureChangeUnit()} per ${this.quantities.pressureChangeUnit()}`;
  });
  protected readonly lines = computed(() =>
    (this.state.phases().value?.lines ?? []).map((line) => {
      const { name, short } = componentById(line.id);
      return {
        id: line.id,
        name,
        short,
        feed: this.percent(line.feed),
        liquid: this.percent(line.liquid),
        vapour: this.percent(line.vapour),
        kValue: line.kValue === null ? noNumber : significant(line.kValue),
        partialPressure:
          line.partialPressure === null
            ? noNumber
            : significant(this.quantities.toPressureChange(line.partialPressure)),
      };
    }),
  );
  protected readonly partialUnit = computed(() => `${this.quantities.pressureChangeUnit()} abs`);

  private percent(fraction: number | null): string {
    return fraction === null ? noNumber : this.quantities.fraction(fraction, this.decimals());
  }

  private decimals(): number {
    return this.quantities.fractionUnit() === 'ppm' ? 0 : 3;
  }
}

/** Four significant digits without an exponent, for figures of very different size in one column. */
function significant(value: number): string {
  if (value === 0) return '0';
  const decimals = Math.max(0, 3 - Math.floor(Math.log10(Math.abs(value))));
  return decimals > 6 ? value.toExponential(3) : formatNumber(value, decimals);
}
