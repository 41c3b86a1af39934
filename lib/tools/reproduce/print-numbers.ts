const mostDigits = 10;

/** A value with its uncertainty: as many digits as two of U's, never more than ten. */
export function withUncertainty(value: number | null, uncertainty: number | null): string {
  if (value === null) return '—';
  if (uncertainty === null) return `${plain(value, mostDigits)} ± not known`;
  return `${plain(value, digitsFor(value, uncertainty))} ± ${brief(uncertainty)}`;
}

function digitsFor(value: number, uncertainty: number): number {
  if (value === 0 || uncertainty <= 0) return mostDigits;
  const digits = Math.floor(Math.log10(Math.abs(value))) - Math.floor(Math.log10(uncertainty)) + 2;
  return Math.min(mostDigits, Math.max(1, digits));
}

/** Fixed where that reads well, else in powers of ten. */
function plain(value: number, digits: number): string {
  const size = Math.abs(value);
  if (value === 0) return '0';
  if (size >= 1e-4 && size < 1e7) {
    const decimals = Math.min(15, Math.max(0, digits - 1 - Math.floor(Math.log10(size))));
    return value.toFixed(decimals);
  }
  return value.toExponential(Math.max(0, digits - 1));
}

/** Two significant digits. */
export function brief(x: number | null): string {
  if (x === null) return '—';
  if (x === 0) return '0';
  return Math.abs(x) >= 1e-4 && Math.abs(x) < 1e5 ? String(Number(x.toPrecision(2))) : x.toExponential(1);
}
