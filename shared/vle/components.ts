import { componentRows } from './data/component-rows';
import { EquilibriumError } from './errors';

/** One pure component; each source is a key of `shared/references.ts`. */
export interface Component {
  readonly id: string;
  readonly name: string;
  /** Plant abbreviation: C3, iC4, nC4 … */
  readonly short: string;
  readonly cas: string;
  readonly formula: string;
  /** [g/mol], summed from standard atomic weights. */
  readonly molarMass: number;
  /** [K] */
  readonly criticalTemperature: number;
  /** [Pa] */
  readonly criticalPressure: number;
  readonly acentricFactor: number;
  readonly criticalSource: string;
  /** At 101325 Pa [K]. */
  readonly normalBoilingPoint: number;
  readonly normalBoilingPointSource: string;
  /** Saturated liquid at 60 °F (288.7056 K) [mol/m³]; null above the critical temperature. */
  readonly liquidAt60F: { readonly density: number; readonly source: string } | null;
}

/** Every component Dewmark knows, lightest families first. */
export const components: readonly Component[] = componentRows;

const byId = new Map(componentRows.map((row) => [row.id, row]));

/** @throws EquilibriumError 'unknown-component' naming the id */
export function componentById(id: string): Component {
  const component = byId.get(id);
  if (!component)
    throw new EquilibriumError(
      'unknown-component',
      `"${id}" is not a component Dewmark knows; ids are lower-case names such as n-butane.`,
    );
  return component;
}
