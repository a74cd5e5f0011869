/** Columns of numbers, one row a minute, growing at the end. */
export class MinuteTable {
  length = 0;
  readonly #columns: Float64Array[];

  constructor(readonly columns: number) {
    this.#columns = Array.from({ length: columns }, () => new Float64Array(4096));
  }

  /** Value of a column in a row; NaN where there is none. */
  at(column: number, row: number): number {
    return row < this.length ? (this.#columns[column]?.[row] ?? Number.NaN) : Number.NaN;
  }

  /** Adds a row and gives it to be filled, column by column. */
  append(fill: (set: (column: number, value: number) => void) => void): void {
    const row = this.length;
    if (row === this.#columns[0]?.length)
      this.#columns.forEach((full, i) => {
        this.#columns[i] = new Float64Array(full.length * 2);
        this.#columns[i].set(full);
      });
    fill((column, value) => {
      this.#columns[column]![row] = value;
    });
    this.length += 1;
  }
}
