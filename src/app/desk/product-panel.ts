import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal } from '@angular/core';
import { isInClassRange, thermometerClasses, thermometerTolerance } from '@shared/inference/instruments';
import { componentById } from '@shared/vle/components';
import { formatNumber, noNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { pressureChangeUnits } from './desk-units';
import { QuantityField } from './quantity-field';
import { relations, typedNumber, type Relation } from './desk-case';
import { DeskState } from './desk-state';
import { productNames } from './desk-words';
import { coverage } from './inferred-plot';

/** What temperature and pressure say of the product, where to go for a target, and what the instruments can tell apart. */
@Component({
  selector: 'app-product-panel',
  imports: [QuantityField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './product-panel.html',
  styleUrl: './product-panel.scss',
})
export class ProductPanel {
  protected readonly state = inject(DeskState);
  protected readonly quantities = inject(Quantities);

  protected readonly relations = relations;
  protected readonly relationNames: Readonly<Record<Relation, string>> = {
    dew: 'Top: vapour at its dew point',
    bubble: 'Bottom: liquid at its bubble point',
  };
  protected readonly pressureChangeUnits = pressureChangeUnits;
  protected readonly classes = thermometerClasses;
  protected readonly product = computed(() => productNames[this.state.relation()]);
  protected readonly isOld = computed(() => this.state.product().isOld || this.state.isUnfinished());

  protected readonly inferred = computed(() => {
    const { value } = this.state.product();
    if (!value) return null;
    const { groupFraction, uncertainty, clamped } = value;
    const decimals = this.quantities.fractionDecimals(groupFraction);
    const text = (fraction: number) => this.quantities.fraction(Math.min(1, Math.max(0, fraction)), decimals);
    return {
      value: text(groupFraction),
      low: text(groupFraction - coverage * uncertainty),
      high: text(groupFraction + coverage * uncertainty),
      clamped,
    };
  });
  protected readonly slateText = computed(() => {
    const fraction = this.state.slateGroupFraction();
    return fraction === null ? noNumber : this.quantities.fraction(fraction);
  });

  /** What stands in the target's field: as typed, until the target changes from elsewhere. */
  protected readonly targetText = linkedSignal<{ target: number; unit: string }, string>({
    source: () => ({ target: this.state.target(), unit: this.quantities.fractionUnit() }),
    computation: ({ target, unit }, before) => {
      const typed = before && typedNumber(before.value);
      const isSame =
        typed !== undefined &&
        before?.source.unit === unit &&
        Math.abs(this.quantities.fromFraction(typed) - target) < 1e-12;
      return isSame ? before.value : String(Number(this.quantities.toFraction(target).toPrecision(6)));
    },
  });
  protected readonly targetFault = computed(() => {
    const typed = typedNumber(this.targetText());
    if (typed === undefined) return 'Write a number, such as 2.5.';
    const fraction = this.quantities.fromFraction(typed);
    return fraction >= 0 && fraction <= 1 ? '' : 'A share lies between none and all of the product.';
  });

  protected readonly temperatureForTarget = computed(() => {
    const { value, isOld, words } = this.state.targetAtPressure();
    return {
      value: value ? this.quantities.temperature(value.temperature, 2) : noNumber,
      change: value
        ? this.quantities.temperatureChange(value.temperature - this.state.temperature(), 2)
        : noNumber,
      isOld: isOld || this.targetFault() !== '' || this.state.isUnfinished(),
      words,
    };
  });
  protected readonly pressureForTarget = computed(() => {
    const { value, isOld, words } = this.state.targetAtTemperature();
    return {
      value: value ? this.quantities.pressure(value.pressure) : noNumber,
      change: value ? this.quantities.pressureChange(value.pressure - this.state.pressure()) : noNumber,
      isOld: isOld || this.targetFault() !== '' || this.state.isUnfinished(),
      words,
    };
  });

  protected readonly thermometer = computed(() => this.state.case().thermometer);
  protected readonly tolerance = computed(() =>
    formatNumber(
      this.quantities.toTemperatureChange(thermometerTolerance(this.thermometer(), this.state.temperature())),
      2,
    ),
  );
  protected readonly isClassRange = computed(() =>
    isInClassRange(this.thermometer(), this.state.temperature()),
  );

  /** What a small error of each reading, or of the slate, looks like in product. */
  protected readonly resolution = computed(() => {
    const { value } = this.state.product();
    if (!value) return [];
    const { sensitivity, byThermometer, byPressure, uncertainty } = value;
    const change = (fraction: number) => this.quantities.fractionChange(fraction, this.resolutionDecimals());
    const band = (fraction: number) => `±${change(coverage * fraction).replace(/^\+/, '')}`;
    const base = this.state.inference();
    const parts = base.kind === 'answered' ? base.value.model.base : [];
    return [
      { cause: '0.1 K of temperature', looksLike: change(0.1 * sensitivity.temperature) },
      { cause: '1 kPa of pressure', looksLike: change(1000 * sensitivity.pressure) },
      { cause: 'thermometer within its class', looksLike: band(byThermometer) },
      { cause: 'pressure within its tolerance', looksLike: band(byPressure) },
      { cause: 'both together, about 95 %', looksLike: band(uncertainty) },
      ...parts.map(({ id }, i) => ({
        cause: `0.1 mol % more ${componentById(id).name} in the slate`,
        looksLike: change(0.001 * (sensitivity.base[i] ?? 0)),
      })),
    ];
  });

  protected typeTarget(text: string): void {
    this.targetText.set(text);
    const typed = typedNumber(text);
    if (typed !== undefined && this.targetFault() === '')
      this.state.change({ target: this.quantities.fromFraction(typed) });
  }

  protected chooseClass(name: string): void {
    const chosen = thermometerClasses.find((each) => each === name);
    if (chosen) this.state.change({ thermometer: chosen });
  }

  private resolutionDecimals(): number {
    return this.quantities.fractionUnit() === 'ppm' ? 1 : 3;
  }
}
