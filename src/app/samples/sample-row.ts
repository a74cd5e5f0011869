import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Sample } from '@shared/api/samples';
import type { SensorDetail } from '@shared/api/sensors';
import { componentById } from '@shared/vle/components';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { durationWords, formatNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';

/** One result; opened, it shows every component and what it did. */
@Component({
  selector: 'app-sample-row',
  imports: [RouterLink, SampleSign],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sample-row.html',
  styleUrl: './sample-row.scss',
})
export class SampleRow {
  private readonly plantTime = inject(PlantTime);
  private readonly clock = inject(Clock);
  protected readonly quantities = inject(Quantities);

  readonly sample = input.required<Sample>();
  readonly sensor = input<SensorDetail>();

  protected readonly drawn = computed(() =>
    this.plantTime.dateTime(this.sample().drawnAt, this.clock.minute()),
  );
  protected readonly received = computed(() =>
    this.plantTime.dateTime(this.sample().receivedAt, this.clock.minute()),
  );
  protected readonly delay = computed(() => durationWords(this.sample().receivedAt - this.sample().drawnAt));
  private readonly own = computed(
    () =>
      this.sample().corrections.find((one) => one.sensorId === this.sensor()?.id) ??
      this.sample().corrections[0],
  );
  protected readonly decimals = computed(() =>
    this.quantities.fractionDecimals(this.sensor()?.limits.high ?? this.own()?.value ?? 0),
  );
  protected readonly value = computed(() => {
    const own = this.own();
    return own ? this.quantities.fraction(own.value, this.decimals()) : null;
  });
  protected readonly sigma = computed(() => {
    const own = this.own();
    return own ? formatNumber(own.innovation / Math.sqrt(own.innovationVariance), 1, true) : null;
  });
  protected readonly offset = computed(() => {
    const own = this.own();
    if (!own) return null;
    const text = (kelvin: number) => this.quantities.temperatureChange(kelvin, 2);
    return `${text(own.offsetBefore)} → ${text(own.offsetAfter)} ${this.quantities.temperatureChangeUnit()}`;
  });
  protected readonly facts = computed(() => {
    const own = this.own();
    if (!own) return [];
    const change = (kelvin: number) =>
      `${this.quantities.temperatureChange(kelvin, 3)} ${this.quantities.temperatureChangeUnit()}`;
    return [
      {
        name: 'lined up with',
        text: `${this.quantities.temperature(own.temperature, 2)} ${this.quantities.temperatureUnit()}, ${this.quantities.pressure(own.pressure)} ${this.quantities.pressureUnit()}`,
      },
      { name: 'observed offset', text: change(own.observedOffset) },
      {
        name: 'innovation',
        text: `${change(own.innovation)}, expected ± ${change(Math.sqrt(own.innovationVariance)).replace('+', '')}`,
      },
      { name: 'gain', text: own.gain.toFixed(2) },
    ];
  });

  protected nameOf(id: string): string {
    return componentById(id).name;
  }

  protected percent(fraction: number): string {
    return (100 * fraction).toFixed(3);
  }
}
