import type { SensorDetail } from '@shared/api/sensors';
import type { PlantTime } from '../core/plant-time';
import { formatNumber } from '../ui/numbers';
import { offsetWords } from '../ui/offset-words';
import type { Quantities } from '../ui/quantities';
import type { TrendWords } from '../ui/trend-chart/trend-picture';

/** How the trend of a sensor is written in the units and the zone in force. Reads signals of both. @param now [UTC ms] */
export function trendWords(
  sensor: SensorDetail,
  quantities: Quantities,
  plantTime: PlantTime,
  now: number,
): TrendWords {
  const decimals = quantities.fractionDecimals(
    sensor.limits.high ?? sensor.limits.low ?? sensor.latest?.value ?? 0,
  );
  const offset = offsetWords(sensor.version?.parameters.correction.domain, quantities);
  return {
    fraction: (value) => quantities.toFraction(value),
    fractionUnit: quantities.fractionUnit(),
    temperature: (kelvin) => quantities.toTemperature(kelvin),
    temperatureUnit: quantities.temperatureUnit(),
    pressure: (pascal) => quantities.toPressure(pascal),
    pressureUnit: quantities.pressureUnit(),
    offset: offset.shown,
    offsetUnit: offset.unit,
    zoneOffset: (t) => plantTime.offset(t),
    axisTime: (t) => {
      const time = plantTime.clockTime(t);
      return time === '00:00' ? (plantTime.dateTime(t, now).split(',')[0] ?? time) : time;
    },
    fullTime: (t) => plantTime.dateTime(t, now),
    fractionText: (value) => quantities.fraction(value, decimals),
    temperatureText: (kelvin) => quantities.temperature(kelvin, 2),
    pressureText: (pascal) => quantities.pressure(pascal),
    offsetText: (value) => formatNumber(offset.shown(value), offset.decimals, true),
  };
}
