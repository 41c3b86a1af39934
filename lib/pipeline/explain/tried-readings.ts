import type { TriedReading } from '@/lib/explain/candidate';
import type { TriedNode } from '@/lib/explain/search/node';
import type { Subject } from './subject';

/** What a person compares by eye: ten digits tell any two readings apart that the search does. */
const shown = (value: number | null): number | null => (value === null ? null : Number(value.toPrecision(10)));

/** Values at the claim's own points again; those that were not asked have none. */
export function atAllPoints(values: readonly (number | null)[], { asked: { claim, points } }: Subject): (number | null)[] {
  const all: (number | null)[] = claim.claimed.map(() => null);
  points.forEach((index, k) => (all[index] = values[k] ?? null));
  return all;
}

const singlesFirst = (p: TriedNode, q: TriedNode): number => p.node.flips.length - q.node.flips.length || (p.node.id < q.node.id ? -1 : p.node.id > q.node.id ? 1 : 0);

/** Every reading that was tried of a claim, failures too: single ones in words, pairs by the ids of both. */
export function triedReadings(subject: Subject, tried: readonly TriedNode[]): TriedReading[] {
  return [...tried].sort(singlesFirst).flatMap(({ node, predictions }): TriedReading[] => {
    const prediction = predictions.get(subject.judged.id);
    if (prediction === undefined) return [];
    const named = node.flips.length === 1 ? { id: node.id, clause: node.flips[0].clause } : { id: node.id };
    return ['because' in prediction ? { ...named, because: prediction.because } : { ...named, values: atAllPoints(prediction.values.map(shown), subject) }];
  });
}
