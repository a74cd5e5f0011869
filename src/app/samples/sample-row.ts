import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Sample } from '@shared/api/samples';
import type { SensorDetail } from '@shared/api/sensors';
import { componentById, components } from '@shared/vle/components';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { durationWords, formatNumber } from '../ui/numbers';
import { offsetWords } from '../ui/offset-words';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';

const placeOf = (id: string) => components.findIndex((component) => component.id === id);

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
  /** Of the sample's point. */
  readonly sensors = input<readonly SensorDetail[]>([]);

  protected readonly drawn = computed(() =>
    this.plantTime.dateTime(this.sample().drawnAt, this.clock.minute()),
  );
  protected readonly received = computed(() =>
    this.plantTime.dateTime(this.sample().receivedAt, this.clock.minute()),
  );
  protected readonly delay = computed(() => durationWords(this.sample().receivedAt - this.sample().drawnAt));
  /** The first sensor speaks for the sample in its line; opened, each has its say. */
  protected readonly sensor = computed(() => this.sensors()[0]);
  protected readonly corrections = computed(() =>
    this.sample().corrections.map((own) => {
      const { quantities } = this;
      const sensor = this.sensors().find((one) => one.id === own.sensorId);
      const offset = offsetWords(sensor?.version?.parameters.correction.domain, quantities);
      const deviation = Math.sqrt(own.innovationVariance);
      return {
        sensorId: own.sensorId,
        name: sensor?.name ?? own.sensorId,
        symbol: sensor?.symbol ?? '',
        value: quantities.fraction(
          own.value,
          quantities.fractionDecimals(sensor?.limits.high ?? sensor?.limits.low ?? own.value),
        ),
        sigma: formatNumber(own.innovation / deviation, 1, true),
        offset: `${formatNumber(offset.shown(own.offsetBefore), offset.decimals, true)} → ${offset.text(own.offsetAfter)}`,
        facts: [
          {
            name: 'lined up with',
            text: `${quantities.temperature(own.temperature, 2)} ${quantities.temperatureUnit()}, ${quantities.pressure(own.pressure)} ${quantities.pressureUnit()}`,
          },
          { name: 'observed offset', text: offset.text(own.observedOffset, 3) },
          {
            name: 'innovation',
            text: `${offset.text(own.innovation, 3)}, expected ± ${offset.text(deviation, 3).replace('+', '')}`,
          },
          { name: 'gain', text: own.gain.toFixed(2) },
          {
            name: 'offset known within (95 %)',
            text: [own.varianceBefore, own.varianceAfter]
              .map((variance) => offset.text(2 * Math.sqrt(variance)).replace('+', ''))
              .join(' → '),
          },
        ],
      };
    }),
  );

  /** In the order in which people name a slate: lightest families first. */
  protected readonly fractions = computed(() =>
    [...this.sample().fractions].sort((a, b) => placeOf(a.id) - placeOf(b.id)),
  );

  protected nameOf(id: string): string {
    return componentById(id).name;
  }

  protected percent(fraction: number): string {
    return (100 * fraction).toFixed(3);
  }
}
