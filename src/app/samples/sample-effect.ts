import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { SampleOutcome } from '@shared/api/samples';
import { noNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';

/** What entering a result changed: said at once, before the next minute shows it. */
@Component({
  selector: 'app-sample-effect',
  imports: [RouterLink, SampleSign],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card', role: 'status' },
  template: `
    <h2><app-sample-sign [state]="outcome().sample.state" /> {{ heading() }}</h2>
    @if (outcome().sample.stateReason; as reason) {
      <p>{{ reason }}</p>
    }
    @for (row of rows(); track row.sensorId) {
      <table>
        <caption>
          {{
            row.name
          }}
        </caption>
        <thead>
          <tr>
            <th></th>
            <th scope="col">before</th>
            <th scope="col">now</th>
          </tr>
        </thead>
        <tbody>
          @for (line of row.lines; track line.name) {
            <tr>
              <th scope="row">{{ line.name }}</th>
              <td class="num">{{ line.before }}</td>
              <td class="num">{{ line.after }}</td>
            </tr>
          }
        </tbody>
      </table>
      <a [routerLink]="['/towers', outcome().sample.towerId]" [queryParams]="{ sensor: row.sensorId }"
        >See it on the trend</a
      >
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
      justify-items: start;
    }
    table {
      border-collapse: collapse;
    }
    caption {
      padding-bottom: 4px;
      text-align: left;
      color: var(--soft);
    }
    th,
    td {
      padding: 3px 22px 3px 0;
      border-bottom: 1px solid var(--line);
      text-align: left;
    }
    th {
      font-size: 12px;
      font-weight: 500;
      color: var(--soft);
    }
  `,
})
export class SampleEffect {
  private readonly quantities = inject(Quantities);
  readonly outcome = input.required<SampleOutcome>();

  protected readonly heading = computed(() => {
    const { sample, alreadyThere } = this.outcome();
    if (alreadyThere) return `This very result was entered before; nothing has changed.`;
    return {
      used: 'The result is used.',
      held: 'The result is held; nothing has changed.',
      pending: 'The result waits.',
      rejected: 'The result is rejected.',
    }[sample.state];
  });
  protected readonly rows = computed(() => {
    const unit = this.quantities.fractionUnit();
    const value = (fraction: number | null) =>
      fraction === null ? noNumber : `${this.quantities.fraction(fraction)} ${unit}`;
    const band = ({ low, high }: { low: number | null; high: number | null }) =>
      low === null || high === null
        ? noNumber
        : `${this.quantities.fraction(low)} to ${this.quantities.fraction(high)} ${unit}`;
    const offset = (kelvin: number) =>
      `${this.quantities.temperatureChange(kelvin, 2)} ${this.quantities.temperatureChangeUnit()}`;
    return this.outcome().effects.map(({ sensorId, sensorName, before, after }) => ({
      sensorId,
      name: sensorName,
      lines: [
        { name: 'inferred', before: value(before.value), after: value(after.value) },
        { name: 'band, 95 %', before: band(before), after: band(after) },
        { name: 'offset', before: offset(before.offset), after: offset(after.offset) },
      ],
    }));
  });
}
