import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { SensorDetail } from '@shared/api/sensors';
import { componentById } from '@shared/vle/components';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { offsetWords } from '../ui/offset-words';
import { Quantities } from '../ui/quantities';

/** What the sensor is made of: version, method, tags, groups. */
@Component({
  selector: 'app-sensor-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card' },
  template: `
    <h2>Sensor</h2>
    @if (facts(); as facts) {
      <dl>
        @for (fact of facts; track fact.name) {
          <div>
            <dt>{{ fact.name }}</dt>
            <dd [class.num]="fact.isNumber">{{ fact.text }}</dd>
          </div>
        }
      </dl>
    } @else {
      <p>No version of this sensor is live.</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 6px;
    }
    dl {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(190px, 1fr));
      gap: 6px 24px;
      margin: 0;
    }
    dt {
      font-size: 12px;
      color: var(--soft);
    }
    dd {
      margin: 0;
      overflow-wrap: anywhere;
    }
  `,
})
export class SensorCard {
  private readonly quantities = inject(Quantities);
  private readonly plantTime = inject(PlantTime);
  private readonly clock = inject(Clock);
  readonly sensor = input.required<SensorDetail>();

  protected readonly facts = computed(() => {
    const { version, latest } = this.sensor();
    if (!version) return null;
    const { parameters } = version;
    const group = (which: 'light' | 'heavy') =>
      parameters.base
        .filter((part) => part.group === which)
        .map((part) => componentById(part.id).short)
        .join(', ');
    const offset = offsetWords(parameters.correction.domain, this.quantities);
    return [
      {
        name: 'version',
        text: `${version.number}, live since ${this.plantTime.dateTime(version.madeLiveAt, this.clock.minute())}`,
      },
      {
        name: 'method',
        text: `${parameters.relation} point, ${parameters.method === 'ideal' ? 'Raoult’s law' : 'Peng–Robinson'}`,
      },
      { name: 'light group', text: group('light') },
      { name: 'heavy group', text: group('heavy') },
      {
        name: 'temperature',
        text: `${parameters.tags.temperature}${latest?.temperature == null ? '' : `: ${this.quantities.temperature(latest.temperature, 2)} ${this.quantities.temperatureUnit()}`}`,
      },
      {
        name: 'pressure at the thermometer',
        text: `${parameters.tags.pressure}${latest?.pressure == null ? '' : `: ${this.quantities.pressure(latest.pressure)} ${this.quantities.pressureUnit()}`}`,
      },
      ...(latest
        ? [
            {
              name: 'offset in force',
              text: `${offset.text(latest.offset)}, ± ${offset.text(2 * latest.offsetDeviation).replace('+', '')} (95 %)`,
              isNumber: true,
            },
          ]
        : []),
    ].map((fact) => ({ isNumber: false, ...fact }));
  });
}
