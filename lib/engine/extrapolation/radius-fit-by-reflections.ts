/** Column j of the matrix is (r₀/r)^j, r₀ the smallest radius; the values stand to its right. */
function rowsOf(radii: readonly number[], values: readonly number[], degree: number): number[][] {
  const nearest = Math.min(...radii);
  return radii.map((r, i) => [...Array.from({ length: degree + 1 }, (_, j) => (nearest / r) ** j), values[i]!]);
}

/** Reflects what lies below the diagonal of column j to zero, in all columns to its right. */
function reflect(rows: number[][], j: number): void {
  const below = rows.slice(j);
  const length = Math.hypot(...below.map((row) => row[j]!));
  const sign = rows[j]![j]! < 0 ? -1 : 1;
  const v = below.map((row, i) => row[j]! + (i === 0 ? sign * length : 0));
  const norm = v.reduce((sum, x) => sum + x * x, 0);
  if (norm === 0) return;
  for (let c = j; c < rows[0]!.length; c++) {
    const along = below.reduce((sum, row, i) => sum + v[i]! * row[c]!, 0);
    below.forEach((row, i) => (row[c] = row[c]! - (2 * along * v[i]!) / norm));
  }
}

/**
 * Route B: coefficients of the least-squares polynomial in r₀/r by Householder reflections of the matrix of powers.
 * Shape:  degree + 1 numbers, the constant term first; radii and values are parallel.
 * Units:  those of the values.
 * Error:  rounding times the condition of the powers, some 10⁴ for degree 4 over a factor of three in radius.
 * Fails:  not finite where there are not more different radii than the degree.
 * Source: Q21; Golub & Van Loan, Matrix Computations, section 5.3 (from memory).
 */
export function fitByReflections(radii: readonly number[], values: readonly number[], degree: number): number[] {
  if (radii.length <= degree) return new Array<number>(degree + 1).fill(Number.NaN);
  const rows = rowsOf(radii, values, degree);
  for (let j = 0; j <= degree; j++) reflect(rows, j);
  const coefficients = new Array<number>(degree + 1).fill(Number.NaN);
  for (let j = degree; j >= 0; j--) {
    let rest = rows[j]?.[degree + 1] ?? Number.NaN;
    for (let k = j + 1; k <= degree; k++) rest -= rows[j]![k]! * coefficients[k]!;
    coefficients[j] = rest / (rows[j]?.[j] ?? Number.NaN);
  }
  return coefficients;
}
