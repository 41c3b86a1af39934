import { createHash } from 'node:crypto';
import { createReadStream, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { ResultClaim } from '@/lib/pipeline/result';

function sha256() {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
}

/** A folder with claim.json and its files, from files to verdicts. */
export async function runFolder(folder: string): Promise<ReadonlyMap<string, ResultClaim>> {
  const source = { sheetJson: readFileSync(join(folder, 'claim.json')), openFile: (name: string) => createReadStream(join(folder, name)) };
  const run = await reproduce(source, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest: sha256 });
  if (!run.ok) throw new Error(JSON.stringify(run.error, null, 1));
  return new Map(run.value.result.claims.map((claim) => [claim.id, claim]));
}
