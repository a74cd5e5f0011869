import { componentById } from './components';
import { bubblePoint, dewPoint, normalised, type Mixture } from './equilibrium';
import { EquilibriumError } from './errors';
import { vapourPressureOf } from './vapour-pressure';
import { walkLine } from './saturation';
import { SaturationLine, type LinePoint } from './saturation-line';

/** A point of a saturation line [K], [Pa]. */
export interface EnvelopePoint {
  readonly temperature: number;
  readonly pressure: number;
}

export interface PhaseEnvelope {
  /** From low pressure upward; the last point is the critical one where the line reaches it. */
  readonly bubble: readonly EnvelopePoint[];
  readonly dew: readonly EnvelopePoint[];
  /** Where bubble and dew line meet; null where the method has none (ideal) or it was not reached. */
  readonly critical: EnvelopePoint | null;
}

/** Lowest pressure drawn [Pa]. */
const lowest = 1e5;

/** Longest step along a line, in ln K, ln T or ln P: fine enough to look smooth. */
const finest = 0.1;

/** Points of an ideal line. */
const idealPoints = 40;

/**
 * Bubble and dew line of a mixture, for drawing.
 *
 * Peng-Robinson lines are followed through their turning points to the critical point, which lies between the two points
 * where every ln K changes sign. Raoult's law has no critical point: its lines end at the lowest critical temperature of a
 * component that makes up a hundredth of the mixture or more.
 *
 * @throws EquilibriumError as for a bubble point
 */
export function phaseEnvelope(mixture: Mixture): PhaseEnvelope {
  const present = normalised(mixture.components).filter((amount) => amount.fraction > 0);
  return mixture.method === 'ideal'
    ? idealEnvelope({ ...mixture, components: present })
    : pengRobinsonEnvelope(present);
}

function idealEnvelope(mixture: Mixture): PhaseEnvelope {
  const ends = mixture.components
    .filter((amount) => amount.fraction >= 0.01)
    .map(({ id }) => vapourPressureOf(id, mixture.correlations?.[id]).row.high);
  const top = Math.min(...ends);
  const line = (point: typeof bubblePoint): EnvelopePoint[] => {
    const start = point(mixture, { pressure: lowest }).temperature;
    return Array.from(
      { length: idealPoints + 1 },
      (_, i) => start + ((top - start) * i) / idealPoints,
    ).flatMap((temperature) => {
      if (temperature < start) return [];
      try {
        return [{ temperature, pressure: point(mixture, { temperature }).pressure }];
      } catch (error) {
        // A correlation chosen by hand may end before the others.
        if (error instanceof EquilibriumError) return [];
        throw error;
      }
    });
  };
  return { bubble: line(bubblePoint), dew: line(dewPoint), critical: null };
}

function pengRobinsonEnvelope(
  present: readonly { readonly id: string; readonly fraction: number }[],
): PhaseEnvelope {
  const components = present.map((amount) => componentById(amount.id));
  const z = present.map((amount) => amount.fraction);
  const bubble = followed(new SaturationLine(components, z, 'liquid'));
  const dew = followed(new SaturationLine(components, z, 'vapour'));
  const critical = bubble.critical ?? dew.critical;
  const closed = (points: readonly EnvelopePoint[]) => (critical ? [...points, critical] : points);
  return { bubble: closed(bubble.points), dew: closed(dew.points), critical };
}

function followed(line: SaturationLine): { points: EnvelopePoint[]; critical: EnvelopePoint | null } {
  const { n } = line;
  const walked: LinePoint[] = [];
  let critical: EnvelopePoint | null = null;
  walkLine(
    line,
    (u, before) => {
      if (before && n > 1) {
        let widest = 0;
        for (let i = 1; i < n; i++) if (Math.abs(before[i]!) > Math.abs(before[widest]!)) widest = i;
        if (Math.sign(u[widest]!) !== Math.sign(before[widest]!)) {
          critical = atEqualPhases([...walked.slice(-3), u], widest, n);
          return true;
        }
      }
      walked.push(u.slice());
      return false;
    },
    lowest,
    finest,
  );
  if (n === 1) {
    const [only] = line.components;
    critical = { temperature: only!.criticalTemperature, pressure: only!.criticalPressure };
  }
  return {
    points: walked.map((u) => ({ temperature: Math.exp(u[n]!), pressure: Math.exp(u[n + 1]!) })),
    critical,
  };
}

/**
 * The point where ln K of one component is zero, by Lagrange interpolation through the points around it. It cannot be
 * solved for: with equal phases every temperature and pressure fits.
 */
function atEqualPhases(around: readonly LinePoint[], component: number, n: number): EnvelopePoint {
  const at = (unknown: number) =>
    around.reduce((sum, u, i) => {
      const weight = around.reduce(
        (product, other, j) =>
          j === i ? product : (product * -other[component]!) / (u[component]! - other[component]!),
        1,
      );
      return sum + weight * u[unknown]!;
    }, 0);
  return { temperature: Math.exp(at(n)), pressure: Math.exp(at(n + 1)) };
}
