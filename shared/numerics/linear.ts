/**
 * Solves A x = r in place by Gaussian elimination with partial pivoting.
 *
 * @param a n × n, row by row; destroyed
 * @param r right-hand side of length n; becomes x
 * @returns false when A is singular to working precision; then r holds nothing of use
 */
export function solveInPlace(a: Float64Array, r: Float64Array, n: number): boolean {
  for (let col = 0; col < n; col++) {
    let pivot = col;
    for (let row = col + 1; row < n; row++)
      if (Math.abs(a[row * n + col]!) > Math.abs(a[pivot * n + col]!)) pivot = row;
    const top = a[pivot * n + col]!;
    if (!(Math.abs(top) > 1e-300)) return false;
    if (pivot !== col) {
      for (let k = col; k < n; k++) {
        const held = a[col * n + k]!;
        a[col * n + k] = a[pivot * n + k]!;
        a[pivot * n + k] = held;
      }
      const held = r[col]!;
      r[col] = r[pivot]!;
      r[pivot] = held;
    }
    for (let row = col + 1; row < n; row++) {
      const factor = a[row * n + col]! / top;
      if (factor === 0) continue;
      for (let k = col; k < n; k++) a[row * n + k]! -= factor * a[col * n + k]!;
      r[row]! -= factor * r[col]!;
    }
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = r[row]!;
    for (let k = row + 1; k < n; k++) sum -= a[row * n + k]! * r[k]!;
    r[row] = sum / a[row * n + row]!;
  }
  return true;
}
