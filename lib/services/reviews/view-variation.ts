import type { SeenVariationRow } from '@/db/reads/reviews/variation-runs';
import type { VariationChanges } from '@/db/schema/variations';
import type { ResultDocument } from '@/lib/pipeline/result';
import { findAnchoredNumber } from '@/lib/reviews/anchors';
import type { ThreadVisibility } from '@/lib/reviews/threads';
import type { VariationView } from './thread-view';

function sentences(changes: VariationChanges): string[] {
  const lines: string[] = [];
  if (changes.fLowHz !== undefined) lines.push(`lower cut-off ${changes.fLowHz} Hz`);
  if (changes.fHighHz !== undefined) lines.push(`upper cut-off ${changes.fHighHz} Hz`);
  if (changes.totalMassMsun !== undefined) lines.push(`total mass ${changes.totalMassMsun} solar masses`);
  if (changes.noise !== undefined) lines.push('curve' in changes.noise ? `built-in noise curve ${changes.noise.curve}` : `noise curve ${changes.noise.named}`);
  return lines;
}

const seenBy = (visibility: ThreadVisibility | null): VariationView['seenBy'] =>
  visibility === null ? 'you alone' : visibility === 'authors' ? 'authors too' : 'referees and editor';

/** `visibility` is that of the thread it is attached to, or null while it is private. */
export function viewVariation(row: SeenVariationRow, official: ResultDocument | null, visibility: ThreadVisibility | null): VariationView {
  const claim = row.result?.claims.find((c) => c.id === row.claimId);
  const points = (claim?.points ?? []).map((point) => ({
    at: point.at,
    value: point.value,
    expandedUncertainty: point.expandedUncertainty,
    official: official ? (findAnchoredNumber(official, { claim: row.claimId, at: point.at })?.value ?? null) : null,
  }));
  return { id: row.id, claim: row.claimId, changes: sentences(row.changes), state: row.state, points, unit: claim?.unit ?? '', note: row.note, seenBy: seenBy(visibility) };
}
