/**
 * A seeded stream of chance, the same on every machine: the small fast counter generator sfc32 (Chris Doty-Humphrey's
 * PractRand; constants from memory). One stream per named purpose, so that a purpose added later leaves the others alone.
 */
export class RandomStream {
  #a: number;
  #b: number;
  #c: number;
  #counter = 1;
  #spare: number | undefined;

  constructor(seed: number, purpose: string) {
    const hash = hashOf(`${seed}/${purpose}`);
    [this.#a, this.#b, this.#c] = [hash, Math.imul(hash, 0x85ebca6b) ^ seed, ~hash];
    for (let i = 0; i < 15; i++) this.#next();
  }

  /** Uniform in [0, 1), 32 bits. */
  uniform(): number {
    return this.#next() / 0x1_0000_0000;
  }

  /** Normal with mean 0 and deviation 1, by Marsaglia's polar method. */
  normal(): number {
    if (this.#spare !== undefined) {
      const spare = this.#spare;
      this.#spare = undefined;
      return spare;
    }
    for (;;) {
      const u = 2 * this.uniform() - 1;
      const v = 2 * this.uniform() - 1;
      const s = u * u + v * v;
      if (s >= 1 || s === 0) continue;
      const scale = Math.sqrt((-2 * Math.log(s)) / s);
      this.#spare = v * scale;
      return u * scale;
    }
  }

  /** Exponential with the given mean. */
  exponential(mean: number): number {
    return -mean * Math.log(1 - this.uniform());
  }

  #next(): number {
    const sum = (this.#a + this.#b + this.#counter) | 0;
    this.#counter = (this.#counter + 1) | 0;
    this.#a = this.#b ^ (this.#b >>> 9);
    this.#b = (this.#c + (this.#c << 3)) | 0;
    this.#c = ((this.#c << 21) | (this.#c >>> 11)) + sum;
    return sum >>> 0;
  }
}

/** FNV-1a over the UTF-16 code units. */
function hashOf(text: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193);
  return hash;
}
