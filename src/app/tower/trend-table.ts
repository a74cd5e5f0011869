import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import type { Trend } from '@shared/api/sensors';
import { qualities } from '@shared/inference/quality';
import { noNumber } from '../ui/numbers';
import type { TrendWords } from '../ui/trend-chart/trend-picture';
import { nearest } from '../ui/trend-chart/trend-tooltip';

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
              The stretch of the picture, newest first
            </caption>
            <thead>
              <tr>
                <th scope="col">time</th>
                <th scope="col">{{ symbol() }}, {{ words().fractionUnit }}</th>
                <th scope="col">band, 95 %</th>
                <th scope="col">quality</th>
                <th scope="col">temperature, {{ words().temperatureUnit }}</th>
                <th scope="col">pressure, {{ words().pressureUnit }}</th>
                <th scope="col">offset, {{ words().offsetUnit }}</th>
              </tr>
            </thead>
            <tbody>
              @for (row of rows(); track row.t) {
                <tr>
                  <td class="num">{{ row.time }}</td>
                  <td class="num">{{ row.value }}</td>
                  <td class="num">{{ row.band }}</td>
                  <td>{{ row.quality }}</td>
                  <td class="num">{{ row.temperature }}</td>
                  <td class="num">{{ row.pressure }}</td>
                  <td class="num">{{ row.offset }}</td>
                </tr>
              } @empty {
                <tr>
                  <td colspan="7">No values in this stretch.</td>
                </tr>
              }
            </tbody>
          </table>
          @if (samples().length > 0) {
            <table>
              <caption>
                Laboratory samples drawn in this stretch
              </caption>
              <thead>
                <tr>
                  <th scope="col">drawn</th>
                  <th scope="col">{{ symbol() }}, {{ words().fractionUnit }}</th>
                  <th scope="col">state</th>
                  <th scope="col">disagreement, σ</th>
                </tr>
              </thead>
              <tbody>
                @for (sample of samples(); track sample.id) {
                  <tr>
                    <td class="num">{{ sample.time }}</td>
                    <td class="num">{{ sample.value }}</td>
                    <td>{{ sample.state }}</td>
                    <td class="num">{{ sample.sigma }}</td>
                  </tr>
                }
              </tbody>
            </table>
          }
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
      max-height: 360px;
      overflow: auto;
    }
    table {
      border-collapse: collapse;
      width: 100%;
    }
    caption:not(.for-ears) {
      padding: 14px 0 4px;
      font-weight: 500;
      text-align: left;
    }
    th,
    td {
      padding: 4px 16px 4px 0;
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
  readonly trend = input.required<Trend>();
  /** The stretch the picture shows [UTC ms]. */
  readonly ends = input.required<{ from: number; to: number }>();
  readonly symbol = input.required<string>();
  readonly words = input.required<TrendWords>();

  protected readonly isOpen = signal(false);
  protected readonly rows = computed(() => {
    if (!this.isOpen()) return [];
    const { inferred, temperature, pressure, offset } = this.trend();
    const { from, to } = this.ends();
    const words = this.words();
    const shown = inferred.t.flatMap((t, i) => (t >= from && t <= to ? [i] : [])).reverse();
    const step = Math.max(1, Math.ceil(shown.length / mostRows));
    const at = (series: Trend['temperature'], t: number, text: (value: number) => string) => {
      const value = series.value[nearest(series.t, t)];
      return value == null ? noNumber : text(value);
    };
    return shown
      .filter((_, k) => k % step === 0)
      .map((i) => {
        const [t, value, low, high] = [inferred.t[i]!, inferred.value[i], inferred.low[i], inferred.high[i]];
        return {
          t,
          time: words.fullTime(t),
          value: value == null ? noNumber : words.fractionText(value),
          band:
            low == null || high == null
              ? noNumber
              : `${words.fractionText(low)} to ${words.fractionText(high)}`,
          quality: qualities[inferred.quality[i]!],
          temperature: at(temperature, t, words.temperatureText),
          pressure: at(pressure, t, words.pressureText),
          offset: at(offset, t, words.offsetText),
        };
      });
  });
  protected readonly samples = computed(() => {
    const { from, to } = this.ends();
    const words = this.words();
    return this.trend()
      .samples.filter((sample) => sample.drawnAt >= from && sample.drawnAt <= to)
      .sort((a, b) => b.drawnAt - a.drawnAt)
      .map(({ id, drawnAt, value, state, standardisedInnovation }) => ({
        id,
        time: words.fullTime(drawnAt),
        value: words.fractionText(value),
        state,
        sigma: standardisedInnovation === null ? noNumber : standardisedInnovation.toFixed(1),
      }));
  });
}
