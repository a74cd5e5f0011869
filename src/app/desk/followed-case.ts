import type { Sample } from '@shared/api/samples';
import type { Estimate, SensorDetail } from '@shared/api/sensors';
import { rebase } from '@shared/correction/base-composition';
import { shortest, type DeskCase } from './desk-case';

type Fractions = Sample['fractions'];

/**
 * What a sensor's slate makes of the case: components, method and correlations of its live version, its product and target.
 *
 * @param sampled the composition of the sample that the sensor rests on, where one was used
 * @returns undefined when no version is live
 */
export function slateOf(
  sensor: SensorDetail,
  sampled: Fractions | null,
): Pick<DeskCase, 'rows' | 'basis' | 'method' | 'correlations' | 'relation' | 'target' | 'pair'> | undefined {
  if (!sensor.version) return undefined;
  const { base, method, correlations, relation, limits } = sensor.version.parameters;
  const fractionOf = (id: string) => sampled?.find((part) => part.id === id)?.fraction ?? 0;
  const slate = sampled
    ? rebase(
        base,
        base.map(({ id }) => fractionOf(id)),
      )
    : base;
  return {
    rows: slate.map(({ id, fraction, group }) => ({ id, amount: shortest(100 * fraction), group })),
    basis: 'mole',
    method,
    correlations,
    relation,
    target: limits.target ?? limits.high ?? limits.low ?? 0.01,
    pair: null,
  };
}

/**
 * Temperature and pressure at which the sensor calculates now: its readings, and the laboratory's offset where that is one of
 * temperature; undefined while it has none.
 */
export function stateOf(
  latest: Estimate | null,
  sensor: SensorDetail,
): (Pick<DeskCase, 'temperature' | 'pressure'> & { readonly offset: number }) | undefined {
  if (latest?.temperature == null || latest.pressure === null) return undefined;
  const isOfTemperature = sensor.version?.parameters.correction.domain === 'temperature';
  const offset = isOfTemperature ? latest.offset : 0;
  return { temperature: latest.temperature + offset, pressure: latest.pressure, offset };
}
