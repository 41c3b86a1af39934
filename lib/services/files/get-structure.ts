import { formatByEnding } from '@/lib/claims/waveform';
import { formatProblem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { fail, type Outcome } from '@/lib/services/app-error';
import { readStructure } from '@/lib/threads/read-hdf5';
import { openFile, type OpenFile } from './open-file';
import type { StructureView } from './structure-schema';

type Format = StructureView['format'];

/** Bytes do not change under their hash, so what they hold is read once while this process lives. */
const known = new Map<string, Promise<StructureView>>();
const mostKnown = 100;
const mostAtOnce = 2;
let running = 0;

/** What an uploaded file of arrays holds, for whoever may see the file. */
export async function getStructure(actor: Actor, submissionId: string, fileId: string): Promise<Outcome<StructureView>> {
  const file = await openFile(actor, submissionId, fileId);
  if (!file.ok) return file;
  const format = formatByEnding(file.value.name);
  if (format === 'text') return fail('invalid', `${file.value.name} is read as text; only .h5, .hdf5, .npz and .npy have datasets to list.`);
  const key = `${format} ${file.value.sha256}`;
  const before = known.get(key);
  if (before) return ok(await before);
  if (running >= mostAtOnce) return { ok: false, error: { code: 'limit', sentence: 'Other files are being looked into. Ask again in a few seconds.', retryAfterS: 3 } };
  const reading = look(file.value, format);
  keep(key, reading);
  return ok(await reading);
}

async function look(file: OpenFile, format: Format): Promise<StructureView> {
  running++;
  try {
    const found = await readStructure(file.name, format, await file.open());
    return found.ok ? { ...found.value, trouble: [] } : { format, entries: [], cut: false, trouble: found.error.map(formatProblem) };
  } finally {
    running--;
  }
}

/** What failed on the way is asked anew; the oldest makes room. */
function keep(key: string, reading: Promise<StructureView>): void {
  known.set(key, reading);
  reading.catch(() => known.delete(key));
  const [oldest] = known.keys();
  if (known.size > mostKnown && oldest !== undefined) known.delete(oldest);
}
