import { expect } from 'vitest';

export interface Tolerance {
  /** Allowed |received − expected|, in the unit of the value. */
  readonly absolute?: number;
  /** Allowed |received − expected| / |expected|. */
  readonly relative?: number;
}

interface AgreementMatcher<R = unknown> {
  /** Agrees with a number within a stated tolerance. Throws when any number is not finite. */
  toAgreeWith: (expected: number, tolerance: Tolerance | number) => R;
}

declare module 'vitest' {
  // eslint-disable-next-line @typescript-eslint/no-explicit-any, @typescript-eslint/no-empty-object-type -- the library's own signature
  interface Matchers<T = any> extends AgreementMatcher<T> {}
}

/** NaN compares false with everything, so a comparison against it must never pass, not even negated. */
function requireFinite(value: unknown, what: string): asserts value is number {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new Error(`${what} is ${String(value)}; expected a finite number`);
}

function allowed(tolerance: Tolerance | number, expected: number): number {
  if (typeof tolerance === 'number') return tolerance;
  if (tolerance.absolute === undefined && tolerance.relative === undefined)
    throw new Error('toAgreeWith needs an absolute or a relative tolerance');
  return (tolerance.absolute ?? 0) + (tolerance.relative ?? 0) * Math.abs(expected);
}

expect.extend({
  toAgreeWith(received: unknown, expected: number, tolerance: Tolerance | number) {
    requireFinite(received, 'The received value');
    requireFinite(expected, 'The expected value');
    const width = allowed(tolerance, expected);
    requireFinite(width, 'The tolerance');
    if (width < 0) throw new Error(`The tolerance is ${width}; expected zero or more`);
    const apart = Math.abs(received - expected);
    return {
      pass: apart <= width,
      message: () => `received ${received}, expected ${expected} ± ${width}: they lie ${apart} apart`,
    };
  },
});
