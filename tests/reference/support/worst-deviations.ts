/** Keeps the worst deviation of each kind of check, for the table the tests print. */
export class WorstDeviations {
  readonly #worst = new Map<string, { off: number; count: number }>();

  note(kind: string, off: number): void {
    const before = this.#worst.get(kind);
    this.#worst.set(kind, { off: Math.max(before?.off ?? 0, off), count: (before?.count ?? 0) + 1 });
  }

  print(source: string): void {
    for (const [kind, { off, count }] of this.#worst)
      console.log(`figure: ${source}: ${kind}: worst ${off.toExponential(1)} of ${count}`);
  }
}
