/**
 * Views: what a service gives, arranged as the record component wants it. No reading and no deciding
 * happens here, so that the same arrangement serves draft, review and public pages.
 */
import type { ClaimHeading, ClaimedPoint } from '@/app/_ui/claim/record-view';
import { headingOf } from '@/app/_ui/claim/claim-heading';
import { parseClaimed } from '@/lib/claims/claimed';
import { quantities } from '@/lib/engine/quantities/registry';
import type { ResultClaim } from '@/lib/pipeline/result';

type Loose = Readonly<Record<string, unknown>>;

const isLoose = (value: unknown): value is Loose => typeof value === 'object' && value !== null && !Array.isArray(value);
const text = (value: unknown): string | null => (typeof value === 'string' && value !== '' ? value : null);

const printedOf = (raw: unknown): string => {
  const claimed = parseClaimed(raw);
  return claimed.ok ? claimed.value.printed : text(raw) ?? 'not readable yet';
};

/** Points of a claim as its sheet has them: one, or one for each value of the swept setting. */
function pointsOf(claim: Loose, isLn: boolean): readonly ClaimedPoint[] {
  const declared = typeof claim['tolerance'] === 'number' ? claim['tolerance'] : null;
  const tolerance = declared !== null && isLn ? Math.log1p(declared) : declared;
  const over = isLoose(claim['over']) ? Object.entries(claim['over'])[0] : undefined;
  const claimed = Array.isArray(claim['claimed']) ? claim['claimed'] : [claim['claimed']];
  const values = over && Array.isArray(over[1]) ? over[1] : [];
  return claimed.map((raw, i) => ({ at: over && typeof values[i] === 'number' ? { [over[0]]: values[i] } : {}, printed: printedOf(raw), tolerance }));
}

const wordsOf = (claim: Loose | undefined) => ({ of: isLoose(claim?.['of']) ? claim['of'] : undefined, noise: text(claim?.['noise']) });

/** Headings before any run: all from the sheet, complete or not. */
export function headingsOfSheet(claims: readonly Loose[]): readonly ClaimHeading[] {
  return claims.map((claim, i) => {
    const id = text(claim['id']) ?? `C${i + 1}`;
    const name = text(claim['quantity']) ?? 'quantity not chosen';
    const quantity = quantities.get(name) ?? null;
    const empty: ResultClaim = { id, quantity: name, unit: quantity?.unit ?? '', verdict: 'not-computable', remarks: [], coverage: { state: 'unknown' }, points: [], budget: [], assumed: [], settings: [], routeB: [], findings: [], candidates: [] };
    return { ...headingOf(empty, quantity, wordsOf(claim)), points: pointsOf(claim, quantity?.scale === 'ln') };
  });
}

/** Headings of what was computed; the sheet adds the names of waveforms and curve. */
export function headingsOfResult(claims: readonly Omit<ResultClaim, 'candidates'>[], sheet: readonly Loose[]): readonly ClaimHeading[] {
  return claims.map((claim) => headingOf(claim, quantities.get(claim.quantity) ?? null, wordsOf(sheet.find((c) => c['id'] === claim.id))));
}
