import type { Estimate, Trend } from '@shared/api/sensors';
import { qualities } from '@shared/inference/quality';

/** A trend with one more minute at its end; a minute it has already changes nothing. */
export function withMinute(trend: Trend, latest: Estimate): Trend {
  if (latest.t <= (trend.inferred.t.at(-1) ?? 0)) return trend;
  const grown = (series: Trend['temperature'], value: number | null) => ({
    t: [...series.t, latest.t],
    value: [...series.value, value],
  });
  return {
    ...trend,
    to: Math.max(trend.to, latest.t),
    inferred: {
      t: [...trend.inferred.t, latest.t],
      value: [...trend.inferred.value, latest.value],
      low: [...trend.inferred.low, latest.low],
      high: [...trend.inferred.high, latest.high],
      quality: [...trend.inferred.quality, qualities.indexOf(latest.quality)],
    },
    rundown: grown(trend.rundown, latest.rundown),
    temperature: grown(trend.temperature, latest.temperature),
    pressure: grown(trend.pressure, latest.pressure),
    offset: grown(trend.offset, latest.offset),
  };
}
