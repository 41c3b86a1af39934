import type { Catalogue } from '@/lib/claims/catalogue';
import type { Claim } from '@/lib/claims/claim';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Measurement } from '@/lib/engine/contract/measurement';
import { unitOf } from '@/lib/engine/contract/quantity';
import { ENGINE_VERSION } from '@/lib/engine/version';
import type { Problem } from '@/lib/kernel/problem';
import { ok, type Result } from '@/lib/kernel/result';
import { catalogue as everything } from './catalogue';
import { HashedFiles, type StreamingDigest } from './hashed-files';
import { measureClaim } from './measure-claim';
import { readInputs } from './read-inputs';
import type { Source } from './reproduce-with';
import type { Place } from '@/lib/kernel/place';

/** One number of a first look: by one route, with an uncertainty that nobody has assessed. */
export interface PreviewPoint {
  readonly at: Place;
  /** As the author printed it. */
  readonly printed: string;
  /** Null where it could not be computed; the findings say why. */
  readonly value: number | null;
}

export interface PreviewClaim {
  readonly id: string;
  readonly title: string;
  readonly unit: string;
  readonly points: readonly PreviewPoint[];
  readonly findings: readonly Finding[];
}

export interface Preview {
  readonly engine: string;
  readonly claims: readonly PreviewClaim[];
}

export interface PreviewOptions {
  readonly onProgress: (fraction: number, doing: string) => void;
  /** A fresh SHA-256: the same bytes given for two waveforms are told by it. */
  readonly digest: () => StreamingDigest;
  /** Defaults to everything this version can compute. */
  readonly catalogue?: Catalogue;
}

const readingShare = 0.4;

/**
 * A first look at a sheet: read as a run reads it, then route A alone. There is no verdict in it and
 * no uncertainty, because one route cannot check itself; the values are those that a run calls route A.
 */
export async function preview(source: Source, { onProgress, digest, catalogue = everything }: PreviewOptions): Promise<Result<Preview, Problem[]>> {
  const sheet = parseClaimSheet(source.sheetJson, catalogue);
  if (!sheet.ok) return sheet;
  const { claims, waveforms, noise } = sheet.value;
  const files = waveforms.size + noise.size;
  let read = 0;
  const inputs = await readInputs(sheet.value, new HashedFiles(source.openFile, digest), (doing) => onProgress((readingShare * read++) / Math.max(1, files), doing), source.readHdf5);
  if (!inputs.ok) return inputs;
  const share = (1 - readingShare) / Math.max(1, claims.length);
  const looked = claims.map((claim, i) => {
    const watch = { onProgress: (fraction: number) => onProgress(readingShare + share * (i + Math.min(1, Math.max(0, fraction))), `${claim.id}: ${claim.quantity.title}`), cancelled: () => false };
    watch.onProgress(0);
    return previewClaim(claim, measureClaim(claim, sheet.value, inputs.value, { withFigures: false, routeAOnly: true }, watch));
  });
  onProgress(1, 'done');
  return ok({ engine: ENGINE_VERSION, claims: looked });
}

const previewClaim = (claim: Claim, { points, findings }: Measurement): PreviewClaim => ({
  id: claim.id,
  title: claim.quantity.title,
  unit: unitOf(claim.quantity, claim.settings),
  points: points.map(({ at, value }, i) => ({ at, printed: claim.claimed[i]?.printed ?? '', value: value !== null && Number.isFinite(value) ? value : null })),
  findings,
});
