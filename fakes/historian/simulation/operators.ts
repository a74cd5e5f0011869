import type { RandomStream } from './random';
import type { TowerSpec } from './tower-spec';

/**
 * The people at the console: every few hours they move the tray temperature's set-point by what they know, which is a
 * laboratory result some hours old, and by a mood of their own; they keep the bottoms in range with the reboiler's heat.
 */
export class Operators {
  /** Set-point of the tray temperature [K], of the pressure [Pa], and factor on the reboiler's heat. */
  traySetPoint: number;
  pressureSetPoint: number;
  dutyFactor = 1;
  /** The heavy group in the product of the last minutes, oldest overwritten. */
  readonly #history: Float64Array;
  #minute = 0;
  #nextMove: number;
  #nextPressureMove: number;

  constructor(
    private readonly spec: TowerSpec,
    private readonly random: RandomStream,
  ) {
    this.traySetPoint = spec.trayControl.setPoint;
    this.pressureSetPoint = spec.pressure.setPoint;
    this.#history = new Float64Array(spec.operators.sampleAge + 1).fill(spec.operators.target);
    this.#nextMove = this.#pause(spec.operators.everyHours);
    this.#nextPressureMove = this.#pause(spec.pressure.setPointMoves.everyHours);
  }

  /**
   * @param product heavy group in the rundown [mol/mol]
   * @param bottomsLight light component in the bottoms [mol/mol]
   */
  nextMinute(product: number, bottomsLight: number): void {
    this.#minute += 1;
    this.#history[this.#minute % this.#history.length] = product;
    if (this.#minute >= this.#nextMove) {
      this.#nextMove = this.#minute + this.#pause(this.spec.operators.everyHours);
      this.#moveTray();
      this.#keepBottoms(bottomsLight);
    }
    if (this.#minute >= this.#nextPressureMove) {
      const { everyHours, deviation, span } = this.spec.pressure.setPointMoves;
      this.#nextPressureMove = this.#minute + this.#pause(everyHours);
      const { setPoint } = this.spec.pressure;
      const wanted = setPoint + (this.pressureSetPoint - setPoint) / 2 + deviation * this.random.normal();
      this.pressureSetPoint = within(wanted, setPoint, span);
    }
  }

  #moveTray(): void {
    const { target, sampleDeviation, gain, restlessness, largestMove, span } = this.spec.operators;
    const oldest = this.#history[(this.#minute + 1) % this.#history.length]!;
    const result = oldest * Math.exp(sampleDeviation * this.random.normal());
    const move = gain * Math.log(target / result) + restlessness * this.random.normal();
    // Set-points are typed to a tenth of a kelvin.
    const tenths = Math.round(within(move, 0, largestMove) * 10) / 10;
    this.traySetPoint = within(this.traySetPoint + tenths, this.spec.trayControl.setPoint, span);
  }

  #keepBottoms(light: number): void {
    const { bottomsRange, dutyStep } = this.spec.operators;
    if (light > bottomsRange[1]) this.dutyFactor *= 1 + dutyStep;
    else if (light < bottomsRange[0]) this.dutyFactor /= 1 + dutyStep;
  }

  /** Minutes until the next move. */
  #pause(everyHours: number): number {
    return Math.ceil(60 * (everyHours / 2 + this.random.exponential(everyHours / 2)));
  }
}

function within(value: number, centre: number, span: number): number {
  return Math.min(centre + span, Math.max(centre - span, value));
}
