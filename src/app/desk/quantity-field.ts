import { ChangeDetectionStrategy, Component, computed, input, linkedSignal, output } from '@angular/core';
import { formatNumber } from '../ui/numbers';
import { typedNumber } from './desk-case';
import { unitLabelled, type Span, type TypedUnit } from './desk-units';

/** A quantity with its unit beside it: typed, or moved by a slider where a span is given. Values are canonical. */
@Component({
  selector: 'app-quantity-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './quantity-field.html',
  styleUrl: './quantity-field.scss',
})
export class QuantityField {
  readonly name = input.required<string>();
  /** Tells the field's parts apart in the page. */
  readonly key = input.required<string>();
  readonly value = input.required<number>();
  readonly units = input.required<readonly [TypedUnit, ...TypedUnit[]]>();
  /** Label of the unit to begin with; a choice made here stays until it changes. */
  readonly preferredUnit = input.required<string>();
  /** What the slider runs over; none without it. */
  readonly span = input<Span | null>(null);
  /** Said when what was typed is a number but cannot be (below absolute zero, say). */
  readonly impossible = input.required<string>();

  /** A new value, typed or slid; null when what stands there is none. */
  readonly edited = output<number | null>();
  /** The slider was let go, or left by a key. */
  readonly settled = output();

  protected readonly unitLabel = linkedSignal(() => this.preferredUnit());
  protected readonly unit = computed(() => unitLabelled(this.unitLabel(), this.units()));
  /** What stands in the field: as typed, until the value changes from elsewhere. */
  protected readonly text = linkedSignal<{ value: number; unit: TypedUnit }, string>({
    source: () => ({ value: this.value(), unit: this.unit() }),
    computation: ({ value, unit }, before) => {
      const typed = before && typedNumber(before.value);
      const isSame = typed !== undefined && isClose(unit.fromShown(typed), value);
      return isSame && before?.source.unit.label === unit.label ? before.value : plain(value, unit);
    },
  });
  protected readonly fault = computed(() => {
    const typed = typedNumber(this.text());
    if (typed === undefined) return 'Write a number, such as 52.3.';
    return this.unit().fromShown(typed) > 0 ? '' : this.impossible();
  });
  protected readonly slider = computed(() => {
    const span = this.span();
    if (!span) return null;
    const unit = this.unit();
    const steps = (canonical: number, round: (x: number) => number) =>
      Number((round(unit.toShown(canonical) / unit.step) * unit.step).toFixed(6));
    return {
      min: steps(span.low, Math.ceil),
      max: steps(span.high, Math.floor),
      step: unit.step,
      value: unit.toShown(this.value()),
      words: `${formatNumber(unit.toShown(this.value()), unit.decimals)} ${unit.label}`,
    };
  });

  protected type(text: string): void {
    this.text.set(text);
    const typed = typedNumber(text);
    this.edited.emit(typed === undefined || this.fault() !== '' ? null : this.unit().fromShown(typed));
  }

  protected chooseUnit(label: string): void {
    const wasFaulty = this.fault() !== '';
    this.unitLabel.set(label);
    // What stood there and was no number has given way to the value in the new unit.
    if (wasFaulty) this.edited.emit(this.value());
  }

  protected slide(shown: string): void {
    const value = this.unit().fromShown(Number(shown));
    if (value > 0) this.edited.emit(value);
  }
}

/** Whether two values are one, but for the rounding of a conversion there and back. */
function isClose(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b));
}

/** A number as it may be typed again: no blanks between thousands, a plain minus, no zeros that say nothing. */
function plain(value: number, unit: TypedUnit): string {
  return String(Number(unit.toShown(value).toFixed(unit.decimals)));
}
