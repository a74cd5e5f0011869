import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  afterRenderEffect,
  computed,
  inject,
  input,
  viewChild,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import type { SampleOutcome } from '@shared/api/samples';
import type { SensorDetail } from '@shared/api/sensors';
import { formatNumber, noNumber } from '../ui/numbers';
import { offsetWords } from '../ui/offset-words';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';

/** What entering a result changed: said at once, before the next minute shows it. */
@Component({
  selector: 'app-sample-effect',
  imports: [RouterLink, SampleSign],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card', role: 'status' },
  template: `
    <h2 #title tabindex="-1"><app-sample-sign [state]="outcome().sample.state" /> {{ heading() }}</h2>
    @if (outcome().sample.stateReason; as reason) {
      <p>{{ reason }}</p>
    }
    @for (row of rows(); track row.sensorId) {
      @if (row.laboratory; as words) {
        <p>{{ words }}</p>
      }
      <table>
        <caption>
          {{
            row.name
          }}
        </caption>
        <thead>
          <tr>
            <td></td>
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
    h2 {
      /* Focus brings the whole card into view, not its first line, and clear of the bars of the shell. */
      scroll-margin: 90px 0 280px;

      &:focus {
        outline: none;
      }
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
  /** Of the sample's point: symbol, limit and correction of each. */
  readonly sensors = input<readonly SensorDetail[]>([]);

  private readonly title = viewChild.required<ElementRef<HTMLElement>>('title');

  constructor() {
    // Brings it into view, and to the ears of who cannot see it.
    afterRenderEffect(() => {
      this.outcome();
      this.title().nativeElement.focus();
    });
  }

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
    const { quantities } = this;
    const { sample, effects } = this.outcome();
    const unit = quantities.fractionUnit();
    return effects.map(({ sensorId, sensorName, before, after }) => {
      const sensor = this.sensors().find((one) => one.id === sensorId);
      const own = sample.corrections.find((correction) => correction.sensorId === sensorId);
      const decimals = quantities.fractionDecimals(sensor?.limits.high ?? before.value ?? own?.value ?? 0);
      const fraction = (value: number) => quantities.fraction(value, decimals);
      const value = (one: number | null) => (one === null ? noNumber : `${fraction(one)} ${unit}`);
      const band = ({ low, high }: { low: number | null; high: number | null }) =>
        low === null || high === null ? noNumber : `${fraction(low)} to ${fraction(high)} ${unit}`;
      const offset = offsetWords(sensor?.version?.parameters.correction.domain, quantities);
      return {
        sensorId,
        name: sensorName,
        laboratory:
          own &&
          `The laboratory has ${sensor?.symbol ?? 'the group'} at ${value(own.value)}, ${formatNumber(own.innovation / Math.sqrt(own.innovationVariance), 1, true)} σ from what was expected.`,
        lines: [
          { name: 'inferred', before: value(before.value), after: value(after.value) },
          { name: 'band, 95 %', before: band(before), after: band(after) },
          { name: 'offset', before: offset.text(before.offset), after: offset.text(after.offset) },
        ],
      };
    });
  });
}
