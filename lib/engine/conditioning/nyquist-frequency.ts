import type { Waveform } from '@/lib/engine/contract/waveform';

const known = new WeakMap<Float64Array, number>();

/** The k-th smallest by partition (values are moved): a full sort of a million steps would cost more than the transform. */
function kthSmallest(values: Float64Array, k: number): number {
  let [from, to] = [0, values.length - 1];
  while (from < to) {
    const pivot = values[(from + to) >> 1]!;
    let [i, j] = [from, to];
    while (i <= j) {
      while (values[i]! < pivot) i++;
      while (values[j]! > pivot) j--;
      if (i > j) break;
      const swapped = values[i]!;
      values[i++] = values[j]!;
      values[j--] = swapped;
    }
    if (k <= j) to = j;
    else if (k >= i) from = i;
    else return values[k]!;
  }
  return values[k]!;
}

function medianStep(axis: Float64Array): number {
  const steps = new Float64Array(axis.length - 1);
  for (let i = 0; i < steps.length; i++) steps[i] = axis[i + 1]! - axis[i]!;
  const middle = steps.length >> 1;
  const upper = kthSmallest(steps, middle);
  return steps.length % 2 === 1 ? upper : (upper + kthSmallest(steps, middle - 1)) / 2;
}

/**
 * Highest frequency that the samples of a record carry.
 * Shape:  one waveform; kept by its axis, which many points share.
 * Units:  cycles per unit of the axis.
 * Error:  uneven records: 1/(2 × median step); frequency-domain files: their last frequency.
 * Fails:  never.
 * Source: settings.md section 1 (`fHighHz`); the median for uneven steps is a house rule.
 */
export function nyquistFrequency({ axis, uniformStep, domain }: Waveform): number {
  if (domain === 'frequency') return axis[axis.length - 1]!;
  if (uniformStep !== null) return 0.5 / uniformStep;
  const found = known.get(axis) ?? 0.5 / medianStep(axis);
  known.set(axis, found);
  return found;
}
