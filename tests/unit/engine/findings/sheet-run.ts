import { createHash } from 'node:crypto';
import type { Finding } from '@/lib/engine/contract/finding';
import { reproduce } from '@/lib/pipeline/reproduce';

function sha256() {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
}

async function* bytesOf(text: string): AsyncGenerator<Uint8Array> {
  yield new TextEncoder().encode(text);
}

/** A sheet and its files from memory, all the way to the findings of its claims. */
export async function findingsOfSheet(sheet: object, files: Readonly<Record<string, string>>): Promise<readonly Finding[]> {
  const sheetJson = { format: 'counterfoil-claim/1', title: 'A specimen', ...sheet };
  const openFile = (name: string): AsyncIterable<Uint8Array> => bytesOf(files[name] ?? '');
  const run = await reproduce({ sheetJson, openFile }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest: sha256 });
  if (!run.ok) throw new Error(JSON.stringify(run.error, null, 1));
  return run.value.result.claims.flatMap((claim) => claim.findings);
}
