import type { Reader } from '@/db/client';
import { listRegisterClaims, type RegisterEntryRow } from '@/db/reads/records/register';
import type { VerdictWord } from '@/lib/pipeline/result';
import type { RegisterRow } from './record-view';

/** Entries with all their claims, whichever of them the search was about. */
export async function viewRows(reader: Reader, entries: readonly RegisterEntryRow[]): Promise<readonly RegisterRow[]> {
  if (entries.length === 0) return [];
  const claims = await listRegisterClaims(reader, entries.map((entry) => entry.id));
  return entries.map((entry) => {
    const own = claims.filter((claim) => claim.recordId === entry.id);
    return {
      id: entry.id,
      title: entry.title,
      authors: entry.authors,
      enteredOn: entry.enteredOn,
      revision: entry.revision,
      level: entry.level,
      standing: entry.standing,
      standingSince: entry.since.toISOString(),
      quantities: [...new Set(own.map((claim) => claim.quantity))],
      noises: [...new Set(own.map((claim) => claim.noise))],
      verdicts: own.map((claim) => claim.verdict as VerdictWord),
    };
  });
}
