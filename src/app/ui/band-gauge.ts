import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { gaugeScale } from './gauge-scale';
import { Quantities } from './quantities';

interface Mark {
  /** Place along the gauge, `42%`. */
  readonly at: string;
  readonly text: string;
  readonly anchor: 'start' | 'middle' | 'end';
}

/** The band of a value against its limits, from zero on where that leaves room to see it. Fractions are mol/mol. */
@Component({
  selector: 'app-band-gauge',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './band-gauge.html',
  styleUrl: './band-gauge.scss',
})
export class BandGauge {
  private readonly quantities = inject(Quantities);

  readonly value = input.required<number | null>();
  /** Ends of the 95 % band. */
  readonly low = input.required<number | null>();
  readonly high = input.required<number | null>();
  readonly limitHigh = input<number | null>(null);
  readonly limitLow = input<number | null>(null);
  readonly target = input<number | null>(null);

  private readonly scale = computed(() =>
    gaugeScale({
      limits: [this.limitLow(), this.limitHigh()],
      values: [this.value(), this.low(), this.high(), this.target()],
    }),
  );
  private readonly decimals = computed(() =>
    this.quantities.fractionDecimals(this.limitHigh() ?? this.limitLow() ?? this.value() ?? 0),
  );

  protected readonly band = computed(() => {
    const [low, high] = [this.low(), this.high()];
    if (low === null || high === null) return null;
    return { at: this.place(low), width: `${this.share(high) - this.share(low)}%` };
  });
  protected readonly marker = computed(() => {
    const value = this.value();
    return value === null ? null : this.place(value);
  });
  protected readonly isOffLimit = computed(() => {
    const value = this.value();
    if (value === null) return false;
    return value > (this.limitHigh() ?? Infinity) || value < (this.limitLow() ?? -Infinity);
  });
  protected readonly targetMark = computed(() => {
    const target = this.target();
    return target === null ? null : this.place(target);
  });
  protected readonly limitMarks = computed(() =>
    [this.limitLow(), this.limitHigh()]
      .filter((limit) => limit !== null)
      .map((limit): Mark => {
        const share = this.share(limit);
        return {
          at: `${share}%`,
          text: this.text(limit),
          anchor: share < 8 ? 'start' : share > 92 ? 'end' : 'middle',
        };
      }),
  );
  /** What lies beyond each limit. */
  protected readonly beyond = computed(() => {
    const [low, high] = [this.limitLow(), this.limitHigh()];
    return [
      ...(low === null ? [] : [{ at: '0%', width: this.place(low) }]),
      ...(high === null ? [] : [{ at: this.place(high), width: `${100 - this.share(high)}%` }]),
    ];
  });
  /** The ends of the scale, where no limit's figure stands in their way. */
  protected readonly ends = computed(() => {
    const { min, max } = this.scale();
    const taken = [this.limitLow(), this.limitHigh()].filter((limit) => limit !== null);
    const isFree = (end: number) =>
      taken.every((limit) => Math.abs(this.share(limit) - this.share(end)) > 22);
    return { min: isFree(min) ? this.text(min) : '', max: isFree(max) ? this.text(max) : '' };
  });

  protected readonly label = computed(() => {
    const value = this.value();
    const [low, high] = [this.low(), this.high()];
    return [
      value === null ? 'no value' : `${this.text(value)} ${this.quantities.fractionUnit()}`,
      low === null || high === null ? '' : `band ${this.text(low)} to ${this.text(high)}`,
      this.said('lower limit', this.limitLow()),
      this.said('limit', this.limitHigh()),
      this.said('target', this.target()),
    ]
      .filter((part) => part !== '')
      .join(', ');
  });

  private said(name: string, value: number | null): string {
    return value === null ? '' : `${name} ${this.text(value)}`;
  }

  private text(value: number): string {
    return this.quantities.fraction(value, this.decimals());
  }

  private share(value: number): number {
    const { min, max } = this.scale();
    return Math.min(100, Math.max(0, (100 * (value - min)) / (max - min)));
  }

  private place(value: number): string {
    return `${this.share(value)}%`;
  }
}
