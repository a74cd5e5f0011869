/** One tag as its source lists it. */
export interface SourceTag {
  readonly name: string;
  readonly description: string;
  /** The source's own unit, in people's words. */
  readonly unit: string;
}

/** Values of one tag in the source's own unit, oldest first. */
export interface SourceSeries {
  readonly tag: string;
  readonly t: readonly number[];
  readonly value: readonly (number | null)[];
  /** Status codes of IEC 62541. */
  readonly status: readonly number[];
}

export interface SourceValue {
  readonly tag: string;
  readonly t: number;
  readonly value: number | null;
  readonly status: number;
}

/** A plant historian, whatever its protocol. Every call ends in an answer or a `SourceFailure` within its timeout. */
export interface HistorianSource {
  listTags(
    search: string,
    cursor?: string,
  ): Promise<{ readonly tags: readonly SourceTag[]; readonly next: string | null }>;
  readLatest(tags: readonly string[]): Promise<readonly SourceValue[]>;
  /** Raw values in [from, to), page by page, until `continuation` is null. */
  readRaw(
    tags: readonly string[],
    from: number,
    to: number,
    continuation?: string,
  ): Promise<{ readonly series: readonly SourceSeries[]; readonly continuation: string | null }>;
  write(
    values: readonly SourceValue[],
  ): Promise<readonly { readonly tag: string; readonly t: number; readonly status: number }[]>;
}

/** Why a source could not be read, in words for the person who looks after it. */
export class SourceFailure extends Error {
  override readonly name = 'SourceFailure';
  constructor(
    readonly kind: 'unreachable' | 'timeout' | 'refused' | 'malformed' | 'failed',
    readonly words: string,
  ) {
    super(words);
  }
}
