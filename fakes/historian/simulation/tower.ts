import { Column } from './column';
import { Controller } from './controller';
import { SimulatedEquilibrium } from './equilibrium';
import { Instrument, type TowerState } from './instruments';
import { Operators } from './operators';
import { RandomStream } from './random';
import { bubbleTemperature, dewTemperature } from './saturation';
import type { TowerSpec } from './tower-spec';
import { Wander } from './wander';
import type { Weather } from './weather';

/** Seconds of one integration step; one step a minute. */
const step = 60;

/** How closely saturation temperatures are solved [K]: those that steer the tower, and the one its thermometer sees. */
const followed = 1e-4;
const measured = 1e-7;

/** One tower with its feed, its controls, its operators and its instruments; moves on a minute at a time. */
export class TowerSimulation {
  readonly column: Column;
  readonly instruments: readonly Instrument[];
  /** True compositions at the sample points [mol/mol], summing to 1. */
  readonly overhead: Float64Array;
  readonly rundown: Float64Array;
  readonly bottoms: Float64Array;
  state!: TowerState;

  readonly #model: SimulatedEquilibrium;
  readonly #feedFlow: Wander;
  readonly #feedComposition: readonly Wander[];
  readonly #feedTemperature: Wander;
  readonly #duty: Wander;
  readonly #operators: Operators;
  readonly #trayController: Controller;
  readonly #pressureController: Controller;
  readonly #trayThermometer: Instrument;
  readonly #heavy: readonly number[];
  readonly #bottomsLight: number;

  /** What was there at the start, and what has been fed and drawn since, per component [mol]. */
  readonly #began: Float64Array;
  readonly #fed: Float64Array;
  readonly #drawn: Float64Array;

  readonly #z: Float64Array;
  #pressure: number;
  #slowAir: number;
  #feedForDuty: number;
  // Saturation temperatures start from the minute before, and so do the phases found with them.
  readonly #feedVapour: Float64Array;
  #feedBubble: number;
  readonly #drumVapour: Float64Array;
  #drumTemperature: number;
  readonly #firstLiquid: Float64Array;
  #dew: number;

  constructor(
    readonly spec: TowerSpec,
    seed: number,
  ) {
    const stream = (purpose: string) => new RandomStream(seed, `${spec.id} ${purpose}`);
    const z = Float64Array.from(spec.feed.composition);
    const { setPoint } = spec.pressure;
    this.#model = new SimulatedEquilibrium(spec.components, spec.vapourInteractionPerCarbon);
    this.column = new Column(this.#model, spec.column, z, setPoint);
    this.overhead = Float64Array.from(z);
    this.rundown = Float64Array.from(z);
    this.bottoms = Float64Array.from(z);
    this.#began = z.map((_, i) => this.column.inventory(i));
    this.#fed = new Float64Array(z.length);
    this.#drawn = new Float64Array(z.length);
    this.instruments = spec.instruments.map((instrument) => new Instrument(instrument, seed));
    this.#trayThermometer = this.instruments.find(
      ({ spec: { measures } }) => measures === 'trayTemperature',
    )!;

    this.#feedFlow = new Wander(spec.feed.flowWander, stream('feed flow'));
    this.#feedComposition = spec.feed.compositionWander.map(
      (wander, i) => new Wander(wander, stream(`feed ${spec.components[i]}`)),
    );
    this.#feedTemperature = new Wander(spec.feed.temperatureWander, stream('feed temperature'));
    this.#duty = new Wander(spec.reboiler.dutyWander, stream('steam supply'));
    this.#operators = new Operators(spec, stream('operators'));
    this.#trayController = new Controller(spec.trayControl.controller, spec.trayControl.reflux);
    this.#pressureController = new Controller(spec.pressure.controller, 0.6);
    this.#heavy = spec.operators.heavy.map((id) => spec.components.indexOf(id));
    this.#bottomsLight = spec.components.indexOf(spec.operators.bottomsLight);

    this.#z = z;
    this.#pressure = setPoint;
    this.#slowAir = spec.pressure.floating.usualAir;
    this.#feedForDuty = spec.feed.flow;
    this.#feedVapour = Float64Array.from(z);
    this.#feedBubble = bubbleTemperature(this.#model, setPoint, z, this.#feedVapour, 330);
    this.#drumVapour = Float64Array.from(z);
    this.#drumTemperature = this.#feedBubble;
    this.#firstLiquid = Float64Array.from(z);
    this.#dew = this.#feedBubble;
  }

  nextMinute(weather: Weather): void {
    const { spec, column } = this;
    this.#operators.nextMinute(sumOf(this.rundown, this.#heavy), this.bottoms[this.#bottomsLight]!);

    const feed = spec.feed.flow * Math.exp(this.#feedFlow.nextMinute());
    this.#mixFeed();
    const q = this.#feedCondition();
    const boilUp = this.#boilUp(feed);
    const vapour = boilUp + (1 - q) * feed;
    // Neither product may run dry, whatever the controller wants.
    const wanted = this.#reflux();
    const reflux = Math.min(0.95 * vapour, Math.max(wanted, boilUp - q * feed + 0.05 * feed));

    const { liquidHead, vapourDrop, usualVapour } = spec.pressure;
    const pressureDrop = liquidHead + vapourDrop * (vapour / usualVapour) ** 2;
    column.step({ feed, z: this.#z, q, reflux, boilUp, pressure: this.#pressure, pressureDrop }, step);
    this.#count(feed);
    this.#movePressure(vapour, weather.coolingTemperature);
    this.#look(feed, reflux, pressureDrop);
    for (const instrument of this.instruments) instrument.nextMinute(this.state, weather.barometer);
  }

  /** Largest difference, of any component, between what was fed and what was drawn or stayed, relative to what was fed. */
  worstImbalance(): number {
    let worst = 0;
    for (let i = 0; i < this.#z.length; i++) {
      const stayed = this.column.inventory(i) - this.#began[i]!;
      worst = Math.max(worst, Math.abs(this.#fed[i]! - this.#drawn[i]! - stayed) / this.#fed[i]!);
    }
    return worst;
  }

  #mixFeed(): void {
    let total = 0;
    this.#feedComposition.forEach((wander, i) => {
      this.#z[i] = this.spec.feed.composition[i]! * Math.exp(wander.nextMinute());
      total += this.#z[i];
    });
    for (let i = 0; i < this.#z.length; i++) this.#z[i]! /= total;
  }

  /** Liquid the feed brings to the stripping section per mole: cold feed condenses vapour. */
  #feedCondition(): number {
    const { temperature, heatCapacity } = this.spec.feed;
    this.#feedBubble = bubbleTemperature(
      this.#model,
      this.#pressure,
      this.#z,
      this.#feedVapour,
      this.#feedBubble,
      followed,
    );
    const cold = this.#feedBubble - (temperature + this.#feedTemperature.nextMinute());
    return 1 + (heatCapacity * cold) / this.#latentHeat(this.#z, 0);
  }

  #boilUp(feed: number): number {
    const { dutyPerFeed, ratioLagMinutes } = this.spec.reboiler;
    this.#feedForDuty += (feed - this.#feedForDuty) / ratioLagMinutes;
    const duty =
      dutyPerFeed * this.#operators.dutyFactor * this.#feedForDuty * Math.exp(this.#duty.nextMinute());
    return duty / this.#latentHeat(this.column.x, (this.column.stages - 1) * this.#z.length);
  }

  #reflux(): number {
    const reading = this.#trayThermometer.reading;
    const error = Number.isNaN(reading) ? 0 : this.#operators.traySetPoint - 273.15 - reading;
    return this.#trayController.nextMinute(error);
  }

  #movePressure(vapour: number, coolingTemperature: number): void {
    const { condenser, condenserDrop, capacity, floating } = this.spec.pressure;
    this.#slowAir += (coolingTemperature - this.#slowAir) / floating.lagMinutes;
    const setPoint =
      this.#operators.pressureSetPoint + floating.perKelvin * (this.#slowAir - floating.usualAir);
    const opening = this.#pressureController.nextMinute(setPoint - this.#pressure);
    this.#drumTemperature = bubbleTemperature(
      this.#model,
      this.#pressure - condenserDrop,
      this.column.drum,
      this.#drumVapour,
      this.#drumTemperature,
      followed,
    );
    const perKelvin = (condenser * opening) / this.#latentHeat(this.column.drum, 0);
    const condensed = perKelvin * Math.max(0, this.#drumTemperature - coolingTemperature);
    // A rising pressure warms the drum and so condenses more: taken at the end of the step, else the loop could ring.
    const drumSlope = 1 / (this.#pressure * this.#vapourPressureSlope());
    this.#pressure += ((vapour - condensed) * step) / (capacity + step * perKelvin * drumSlope);
  }

  /** d ln P/dT of the drum's liquid [1/K], from the K-values `movePressure` ended with. */
  #vapourPressureSlope(): number {
    let slope = 0;
    for (let i = 0; i < this.#z.length; i++) slope += this.#drumVapour[i]! * this.#model.slope[i]!;
    return slope;
  }

  /** Heat of vaporisation of a mixture [J/mol]. */
  #latentHeat(x: Float64Array, offset: number): number {
    let heat = 0;
    let total = 0;
    for (let i = 0; i < this.#z.length; i++) {
      heat += x[offset + i]! * this.#model.components[i]!.latentHeat;
      total += x[offset + i]!;
    }
    return heat / total;
  }

  #count(feed: number): void {
    const { column } = this;
    const last = (column.stages - 1) * this.#z.length;
    for (let i = 0; i < this.#z.length; i++) {
      this.#fed[i]! += feed * this.#z[i]! * step;
      this.#drawn[i]! += (column.distillate * column.drum[i]! + column.bottoms * column.x[last + i]!) * step;
    }
  }

  /** Takes down what can be seen, and sampled, at the end of the minute. */
  #look(feed: number, reflux: number, pressureDrop: number): void {
    const { column, spec } = this;
    const n = this.#z.length;
    const last = column.stages - 1;
    normalise(column.y, 0, this.overhead);
    normalise(column.drum, 0, this.rundown);
    normalise(column.x, last * n, this.bottoms);
    this.#dew = dewTemperature(
      this.#model,
      this.#pressure,
      this.overhead,
      this.#firstLiquid,
      this.#dew,
      measured,
    );
    const drumMass = this.#massPerMole(this.rundown);
    this.state = {
      overheadTemperature: this.#dew,
      overheadPressure: this.#pressure,
      pressureDrop,
      trayTemperature: column.T[spec.trayControl.tray - 1]!,
      traySetPoint: this.#operators.traySetPoint,
      reboilerTemperature: column.T[last]!,
      drumTemperature: this.#drumTemperature,
      refluxMass: reflux * drumMass,
      feedMass: feed * this.#massPerMole(this.#z),
      distillateMass: column.distillate * drumMass,
      bottomsMass: column.bottoms * this.#massPerMole(this.bottoms),
    };
  }

  /** Molar mass of a mixture [kg/mol]. */
  #massPerMole(fractions: Float64Array): number {
    let grams = 0;
    for (let i = 0; i < fractions.length; i++) grams += fractions[i]! * this.#model.components[i]!.molarMass;
    return grams / 1000;
  }
}

function sumOf(fractions: Float64Array, indices: readonly number[]): number {
  let sum = 0;
  for (const index of indices) sum += fractions[index]!;
  return sum;
}

function normalise(from: Float64Array, offset: number, to: Float64Array): void {
  let sum = 0;
  for (let i = 0; i < to.length; i++) sum += from[offset + i]!;
  for (let i = 0; i < to.length; i++) to[i] = from[offset + i]! / sum;
}
