/** What a test asks of its plant. */
export type PlantRequest =
  | { readonly do: 'advance'; readonly minutes: number }
  | { readonly do: 'truth'; readonly t: number }
  | { readonly do: 'stop' };

export interface PlantAnswer {
  /** The plant's clock [UTC ms]. */
  readonly now: number;
  /** Only in the first message: where the application is. */
  readonly url?: string;
  /** Mole fractions by component. */
  readonly truth?: Readonly<Record<string, number>>;
}
