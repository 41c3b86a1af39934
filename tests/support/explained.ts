import { createHash } from 'node:crypto';
import { createReadStream, readFileSync } from 'node:fs';
import path from 'node:path';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { ResultClaim, ResultDocument } from '@/lib/pipeline/result';

const folderOf = (specimen: string): string => path.join(process.cwd(), 'content', 'specimens', specimen);

interface Changes {
  /** Puts something else into the sheet before it is read. */
  readonly sheet?: (sheet: Record<string, unknown>) => unknown;
  readonly endedBy?: () => string | null;
  readonly cancelled?: () => boolean;
}

/** A specimen through the whole pipeline, with the search. */
export async function explained(specimen: string, { sheet = (given) => given, endedBy = () => null, cancelled = () => false }: Changes = {}): Promise<ResultDocument> {
  const given = JSON.parse(readFileSync(path.join(folderOf(specimen), 'claim.json'), 'utf8')) as Record<string, unknown>;
  const done = await reproduce(
    { sheetJson: sheet(given), openFile: (name) => createReadStream(path.join(folderOf(specimen), name)) },
    { withFigures: false, onProgress: () => undefined, cancelled, explain: { endedBy }, digest: () => { const hash = createHash('sha256'); return { update: (bytes) => void hash.update(bytes), hex: () => hash.digest('hex') }; } },
  );
  if (!done.ok) throw new Error(JSON.stringify(done.error));
  return done.value.result;
}

export function claimOf(result: ResultDocument, id: string): ResultClaim {
  const claim = result.claims.find((one) => one.id === id);
  if (!claim) throw new Error(`no claim ${id}`);
  return claim;
}
