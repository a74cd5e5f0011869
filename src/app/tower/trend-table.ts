import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import type { Trend } from '@shared/api/sensors';
import { qualities } from '@shared/inference/quality';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { noNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';

/** About how many rows to read out: a table of every minute helps nobody. */
const mostRows = 24;

/** The trend in words and numbers, for who cannot see the picture or wants the figures. */
@Component({
  selector: 'app-trend-table',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <details (toggle)="isOpen.set(!isOpen())">
      <summary>The trend as a table</summary>
      @if (isOpen()) {
        <div class="scroll" tabindex="0" role="region" aria-label="The trend as a table">
          <table>
            <caption class="for-ears">
              Newest values first
            </caption>
            <thead>
              <tr>
                <th scope="col">time</th>
                <th scope="col">{{ symbol() }}, {{ quantities.fractionUnit() }}</th>
                <th scope="col">band, 95 %</th>
                <th scope="col">quality</th>
              </tr>
            </thead>
            <tbody>
              @for (row of rows(); track row.t) {
                <tr>
                  <td class="num">{{ row.time }}</td>
                  <td class="num">{{ row.value }}</td>
                  <td class="num">{{ row.band }}</td>
                  <td>{{ row.quality }}</td>
                </tr>
              } @empty {
                <tr>
                  <td colspan="4">No values in this stretch.</td>
                </tr>
              }
            </tbody>
          </table>
        </div>
      }
    </details>
  `,
  styles: `
    summary {
      display: inline-block;
      padding: 6px 0;
      color: var(--inferred);
      cursor: pointer;
    }
    .scroll {
      max-height: 320px;
      overflow: auto;
    }
    table {
      border-collapse: collapse;
      width: 100%;
    }
    th,
    td {
      padding: 4px 12px 4px 0;
      border-bottom: 1px solid var(--line);
      text-align: left;
      white-space: nowrap;
    }
    th {
      font-size: 12px;
      font-weight: 500;
      color: var(--soft);
    }
  `,
})
export class TrendTable {
  private readonly plantTime = inject(PlantTime);
  private readonly clock = inject(Clock);
  protected readonly quantities = inject(Quantities);

  readonly trend = input.required<Trend>();
  readonly symbol = input.required<string>();

  protected readonly isOpen = signal(false);
  protected readonly rows = computed(() => {
    if (!this.isOpen()) return [];
    const { t, value, low, high, quality } = this.trend().inferred;
    const step = Math.max(1, Math.ceil(t.length / mostRows));
    const now = this.clock.minute();
    const text = (fraction: number | null | undefined) =>
      fraction == null ? noNumber : this.quantities.fraction(fraction);
    return Array.from({ length: Math.ceil(t.length / step) }, (_, k) => t.length - 1 - k * step).map((i) => ({
      t: t[i]!,
      time: this.plantTime.dateTime(t[i]!, now),
      value: text(value[i]),
      band: low[i] == null ? noNumber : `${text(low[i])} to ${text(high[i])}`,
      quality: qualities[quality[i]!],
    }));
  });
}
