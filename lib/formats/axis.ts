/** Steps within this of one another are one step. */
export const EVEN_TO = 1e-5;

/**
 * The one step of an evenly sampled record (settings.md rule 2.1), or null.
 * Rounded time columns shake single steps by far less than 1e-5 of a step, so the step is taken
 * from the ends of the record.
 */
export function uniformStepOf(axis: Float64Array): number | null {
  const n = axis.length;
  const step = (axis[n - 1]! - axis[0]!) / (n - 1);
  for (let i = 1; i < n; i++) if (!(Math.abs(axis[i]! - axis[i - 1]! - step) <= EVEN_TO * step)) return null;
  return step;
}

/** Middle of the steps, by counting in a sorted copy. */
export function medianStep(axis: Float64Array): number {
  const steps = new Float64Array(axis.length - 1);
  for (let i = 0; i < steps.length; i++) steps[i] = axis[i + 1]! - axis[i]!;
  steps.sort();
  return steps[steps.length >> 1]!;
}
