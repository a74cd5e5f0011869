import type { ColumnDesign } from './column';
import type { SimulatedComponentId } from './components';
import type { ControllerSpec } from './controller';
import type { InstrumentSpec } from './instruments';
import type { WanderSpec } from './wander';

/** Everything that makes one tower: another tower is another record of this shape. */
export interface TowerSpec {
  readonly id: string;
  readonly name: string;
  /** Components in the order of every composition below; the vapour's pair interaction of its equilibrium [-]. */
  readonly components: readonly SimulatedComponentId[];
  readonly vapourInteractionPerCarbon: number;
  readonly column: ColumnDesign;
  readonly feed: {
    /** Usual flow [mol/s], and how its logarithm strays. */
    readonly flow: number;
    readonly flowWander: WanderSpec;
    /** Usual composition [mol/mol], and how the logarithm of each component's amount strays. */
    readonly composition: readonly number[];
    readonly compositionWander: readonly WanderSpec[];
    /** Usual temperature [K] and how it strays [K]. */
    readonly temperature: number;
    readonly temperatureWander: WanderSpec;
    /** Heat capacity of the liquid feed [J/mol/K]. */
    readonly heatCapacity: number;
  };
  readonly pressure: {
    /** Set-point above the top tray [Pa]; operators move it now and then. */
    readonly setPoint: number;
    /** It floats with the weather, as far as the condenser can follow: change per kelvin of cooling air [Pa/K], lag [min]. */
    readonly floating: { readonly perKelvin: number; readonly lagMinutes: number; readonly usualAir: number };
    readonly setPointMoves: {
      readonly everyHours: number;
      readonly deviation: number;
      readonly span: number;
    };
    /** Heat the condenser takes fully open [W per K between drum and cooling air]. */
    readonly condenser: number;
    /** Pressure lost between tower top and drum [Pa]. */
    readonly condenserDrop: number;
    /** Vapour needed to raise the pressure, flashing of the liquid included [mol/Pa]. */
    readonly capacity: number;
    /** Output: opening of the condenser, 0…1. */
    readonly controller: ControllerSpec;
    /** Pressure drop over the trays: liquid head, and what the vapour adds at its usual flow [Pa]. */
    readonly liquidHead: number;
    readonly vapourDrop: number;
    readonly usualVapour: number;
  };
  readonly reboiler: {
    /** Heat per mole of feed [J/mol], how its logarithm strays (steam supply), and how feed changes reach it [min]. */
    readonly dutyPerFeed: number;
    readonly dutyWander: WanderSpec;
    readonly ratioLagMinutes: number;
  };
  /** Tray temperature, held by reflux [mol/s]. */
  readonly trayControl: {
    /** Tray of the thermometer, counted from the top, first is 1. */
    readonly tray: number;
    readonly setPoint: number;
    readonly controller: ControllerSpec;
    readonly reflux: number;
  };
  readonly operators: {
    /** What the overhead product must keep low: components of the heavy group, and the fraction they aim at [mol/mol]. */
    readonly heavy: readonly SimulatedComponentId[];
    readonly target: number;
    /** Mean time between moves [h], never less than half of it. */
    readonly everyHours: number;
    /** Age of the sample result they act on [min], and its relative deviation. */
    readonly sampleAge: number;
    readonly sampleDeviation: number;
    /** Move of the tray set-point per unit of ln(target/result) [K], chance on top of it [K], largest move [K]. */
    readonly gain: number;
    readonly restlessness: number;
    readonly largestMove: number;
    /** How far the set-point may get from where it began [K]. */
    readonly span: number;
    /** The bottoms' light component and the range [mol/mol] outside of which the heat is changed by a step (relative). */
    readonly bottomsLight: SimulatedComponentId;
    readonly bottomsRange: readonly [number, number];
    readonly dutyStep: number;
  };
  readonly instruments: readonly InstrumentSpec[];
  /** Tags others may write to. */
  readonly writable: readonly { readonly tag: string; readonly description: string; readonly unit: string }[];
}
