/** Tuning of a proportional-integral controller. */
export interface ControllerSpec {
  /** Change of output per unit of error; negative where more output lowers what is measured. */
  readonly gain: number;
  readonly integralMinutes: number;
  readonly low: number;
  readonly high: number;
}

/** A proportional-integral controller run once a minute; it stops integrating while its output is at a limit. */
export class Controller {
  output: number;
  #integral: number;

  constructor(
    private readonly spec: ControllerSpec,
    start: number,
  ) {
    this.output = start;
    this.#integral = start;
  }

  /** @param error set-point less measured value */
  nextMinute(error: number): number {
    const { gain, integralMinutes, low, high } = this.spec;
    const integral = this.#integral + (gain * error) / integralMinutes;
    const wanted = gain * error + integral;
    this.output = Math.min(high, Math.max(low, wanted));
    const windsUp = (wanted > high && gain * error > 0) || (wanted < low && gain * error < 0);
    if (!windsUp) this.#integral = integral;
    return this.output;
  }
}
