import type { OfferedReading, ReadOtherwise } from '@/lib/explain/read-otherwise';
import { ok } from '@/lib/kernel/result';
import { fail, type Outcome } from '@/lib/services/app-error';
import type { AskedChanges } from './changes';
import type { VariationChanges } from './variation-view';

/** The readings asked for, with the words that the base run offered them in. */
export function readingsOf({ readings = [] }: AskedChanges, offered: readonly OfferedReading[]): Outcome<NonNullable<VariationChanges['readings']>> {
  const found = readings.map((id) => offered.find((reading) => reading.id === id));
  const problems = readings.flatMap((id, i) =>
    found[i] ? [] : [{ code: 'variations/not-offered', where: `/changes/readings/${i}`, saw: id, expected: offered.length === 0 ? 'no reading: the base run offers none of this claim; check or measure it again with the present engine' : 'one of the readings that the base run offers of this claim' }],
  );
  if (problems.length > 0) return fail('invalid', 'This claim cannot be read so.', problems);
  return ok(found.flatMap((reading) => (reading ? [{ id: reading.id, clause: reading.clause }] : [])));
}

/** What the run is told beside its sheet; nothing where the sheet says it all. */
export function otherwiseOf({ readings = [], mask }: VariationChanges): { readonly otherwise?: ReadOtherwise } {
  if (readings.length === 0 && mask === undefined) return {};
  return { otherwise: { readings: readings.map(({ id }) => id), ...(mask && { mask }) } };
}
