/** Quality of a value in the words of IEC 62541; the order is from best to worst. */
export const qualities = ['Good', 'Uncertain', 'Bad'] as const;
export type Quality = (typeof qualities)[number];

/**
 * Why a value is not Good. Each reason has its own bit, so that a stored estimate keeps all of them in one integer;
 * a bit once given is never given to another reason.
 */
export const qualityReasons = [
  {
    code: 'temperature-bad',
    bit: 0,
    quality: 'Bad',
    words: 'the temperature is marked bad by the historian',
  },
  { code: 'pressure-bad', bit: 1, quality: 'Bad', words: 'the pressure is marked bad by the historian' },
  { code: 'temperature-missing', bit: 2, quality: 'Bad', words: 'no recent temperature' },
  { code: 'pressure-missing', bit: 3, quality: 'Bad', words: 'no recent pressure' },
  { code: 'no-live-version', bit: 4, quality: 'Bad', words: 'no version of this sensor is live' },
  {
    code: 'solver-failed',
    bit: 5,
    quality: 'Bad',
    words: 'no composition fits this temperature and pressure',
  },
  {
    code: 'temperature-uncertain',
    bit: 6,
    quality: 'Uncertain',
    words: 'the historian calls the temperature uncertain',
  },
  {
    code: 'pressure-uncertain',
    bit: 7,
    quality: 'Uncertain',
    words: 'the historian calls the pressure uncertain',
  },
  {
    code: 'temperature-out-of-range',
    bit: 8,
    quality: 'Uncertain',
    words: 'temperature outside the range the sensor was set up for',
  },
  {
    code: 'pressure-out-of-range',
    bit: 9,
    quality: 'Uncertain',
    words: 'pressure outside the range the sensor was set up for',
  },
  {
    code: 'temperature-jumped',
    bit: 10,
    quality: 'Uncertain',
    words: 'the temperature jumped faster than the tower can',
  },
  {
    code: 'pressure-jumped',
    bit: 11,
    quality: 'Uncertain',
    words: 'the pressure jumped faster than the tower can',
  },
  {
    code: 'temperature-flat',
    bit: 12,
    quality: 'Uncertain',
    words: 'the temperature has not moved at all: is the instrument frozen?',
  },
  {
    code: 'pressure-flat',
    bit: 13,
    quality: 'Uncertain',
    words: 'the pressure has not moved at all: is the instrument frozen?',
  },
  {
    code: 'entrainment-suspected',
    bit: 14,
    quality: 'Uncertain',
    words: 'high differential pressure: liquid may be carried over',
  },
  { code: 'not-steady', bit: 15, quality: 'Uncertain', words: 'the tower is not steady' },
  { code: 'sample-too-old', bit: 16, quality: 'Uncertain', words: 'the last used sample is too old' },
  {
    code: 'no-sample-yet',
    bit: 17,
    quality: 'Uncertain',
    words: 'no sample has been used yet; the slate is a default',
  },
  {
    code: 'clamped',
    bit: 18,
    quality: 'Uncertain',
    words: 'temperature and pressure lie outside what this slate can be',
  },
  {
    code: 'correlation-out-of-range',
    bit: 19,
    quality: 'Uncertain',
    words: 'a vapour pressure correlation is used outside its range',
  },
] as const satisfies readonly { code: string; bit: number; quality: Quality; words: string }[];

export type QualityReason = (typeof qualityReasons)[number]['code'];

const byCode = new Map(qualityReasons.map((reason) => [reason.code, reason]));

/** One integer with the bit of each reason set. */
export function packReasons(reasons: readonly QualityReason[]): number {
  return reasons.reduce((bits, code) => bits | (1 << byCode.get(code)!.bit), 0);
}

/** The reasons whose bits are set, in the order of `qualityReasons` (worst first). */
export function unpackReasons(bits: number): QualityReason[] {
  return qualityReasons.filter((reason) => (bits & (1 << reason.bit)) !== 0).map((reason) => reason.code);
}

/** The worst quality any of the reasons asks for; Good without reasons. */
export function qualityOf(reasons: readonly QualityReason[]): Quality {
  const worst = reasons.reduce(
    (rank, code) => Math.max(rank, qualities.indexOf(byCode.get(code)!.quality)),
    0,
  );
  return qualities[worst]!;
}

/** The reason in words for a person. */
export function reasonWords(code: QualityReason): string {
  return byCode.get(code)!.words;
}
