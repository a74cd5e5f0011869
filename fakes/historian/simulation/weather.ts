import { RandomStream } from './random';
import { Wander } from './wander';

const minutesPerDay = 1440;

/** How often a cloudburst begins. */
const cloudburstsPerHour = { afternoon: 1 / 16, else: 1 / 67 };

/**
 * The weather of the site, as far as condensers and gauge pressures feel it: a daily swing, fronts that take days, and
 * cloudbursts, mostly in the afternoon, that wet the coolers for half an hour to two hours.
 */
export class Weather {
  /** Temperature of the air as the condensers feel it [K]: a wet cooler is a colder cooler. */
  coolingTemperature = 0;
  /** Temperature a thermometer in the shade would show [K]. */
  airTemperature = 0;
  /** Barometric pressure [Pa]. */
  barometer = 0;

  readonly #front: Wander;
  readonly #cloud: Wander;
  readonly #pressure: Wander;
  readonly #rainRandom: RandomStream;
  #rainLeft = 0;
  #rainDepth = 0;
  #wetness = 0;

  constructor(seed: number) {
    this.#front = new Wander({ deviation: 3, hours: 55 }, new RandomStream(seed, 'weather front'));
    this.#cloud = new Wander({ deviation: 0.25, hours: 20 }, new RandomStream(seed, 'cloud cover'));
    this.#pressure = new Wander({ deviation: 700, hours: 40 }, new RandomStream(seed, 'barometer'));
    this.#rainRandom = new RandomStream(seed, 'rain');
  }

  /** @param t the minute that begins [UTC ms] */
  nextMinute(t: number): void {
    // Local solar time of the invented site, four hours behind UTC; warmest at three in the afternoon.
    const hour = ((((t / 60_000 - 240) % minutesPerDay) + minutesPerDay) % minutesPerDay) / 60;
    const sun = Math.cos(((hour - 15) / 24) * 2 * Math.PI);
    const swing = 5.5 * Math.max(0.2, 1 + this.#cloud.nextMinute());
    this.airTemperature = 290.15 + swing * sun + this.#front.nextMinute();

    const isAfternoon = hour > 12 && hour < 20;
    const begins =
      this.#rainRandom.uniform() <
      (isAfternoon ? cloudburstsPerHour.afternoon : cloudburstsPerHour.else) / 60;
    if (begins && this.#rainLeft <= 0) {
      this.#rainLeft = 20 + this.#rainRandom.exponential(25);
      this.#rainDepth = 4 + 5 * this.#rainRandom.uniform();
    }
    this.#rainLeft -= 1;
    const isRaining = this.#rainLeft > 0;
    // Wet in ten minutes, dry again in forty.
    this.#wetness += ((isRaining ? this.#rainDepth : 0) - this.#wetness) / (isRaining ? 10 : 40);
    this.coolingTemperature = this.airTemperature - this.#wetness;
    this.barometer = 101_300 + this.#pressure.nextMinute();
  }
}
