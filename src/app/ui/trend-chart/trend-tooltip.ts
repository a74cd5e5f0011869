import type { Trend } from '@shared/api/sensors';
import { qualities } from '@shared/inference/quality';
import type { TrendPicture, TrendWords } from './trend-picture';

/** How near a sample or note must be to the pointer to be told of, as a share of the time shown. */
const near = 0.01;
/** Characters after which a line of the tooltip is broken: it must fit a telephone. */
const longestLine = 46;

/** What the tooltip says of one moment, line by line. */
export function tooltipText(picture: TrendPicture, words: TrendWords, t: number): string {
  const { trend, symbol, from, to } = picture;
  const i = nearest(trend.inferred.t, t);
  const said = [words.fullTime(i < 0 ? t : trend.inferred.t[i]!)];
  if (i >= 0) {
    const { value, low, high, quality } = trend.inferred;
    const text = value[i] == null ? 'no value' : `${words.fractionText(value[i])} ${words.fractionUnit}`;
    said.push(`${symbol}  ${text}, ${qualities[quality[i]!]}`);
    if (value[i] != null && low[i] != null && high[i] != null)
      said.push(`band  ${words.fractionText(low[i])} to ${words.fractionText(high[i])}`);
  }
  const at = (series: Trend['temperature'], name: string, text: (value: number) => string, unit: string) => {
    const k = nearest(series.t, t);
    const value = k < 0 ? null : series.value[k];
    if (value != null) said.push(`${name}  ${text(value)} ${unit}`);
  };
  at(trend.temperature, 'temperature', words.temperatureText, words.temperatureUnit);
  at(trend.pressure, 'pressure', words.pressureText, words.pressureUnit);
  at(trend.offset, 'offset', words.offsetText, words.offsetUnit);
  const reach = (to - from) * near;
  for (const sample of trend.samples)
    if (Math.abs(sample.drawnAt - t) <= reach) {
      const sigma = sample.standardisedInnovation;
      const disagreement = sigma === null ? '' : `, ${Math.abs(sigma).toFixed(1)} σ`;
      said.push(
        `laboratory  ${words.fractionText(sample.value)} ${words.fractionUnit}, ${sample.state}${disagreement}`,
        `drawn  ${words.fullTime(sample.drawnAt)}`,
      );
    }
  for (const note of trend.notes)
    if (Math.abs(note.t - t) <= reach) said.push(...broken(`note by ${note.author}: ${note.text}`));
  return said.join('\n');
}

/** Position of the time nearest to t; −1 when there is none. */
export function nearest(times: readonly number[], t: number): number {
  if (times.length === 0) return -1;
  let low = 0;
  let high = times.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (times[middle]! < t) low = middle + 1;
    else high = middle;
  }
  return low > 0 && t - times[low - 1]! < times[low]! - t ? low - 1 : low;
}

/** A sentence in lines short enough, broken between words where it has any. */
function broken(text: string): string[] {
  const lines: string[] = [];
  for (const word of text.split(/\s+/)) {
    const last = lines.at(-1);
    if (last !== undefined && last.length + word.length < longestLine)
      lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines;
}
