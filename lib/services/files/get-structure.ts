import { formatByEnding } from '@/lib/claims/waveform';
import { formatProblem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { fail, type Outcome } from '@/lib/services/app-error';
import { readStructure } from '@/lib/threads/read-hdf5';
import { KnownStructures } from './known-structures';
import { openFile, type OpenFile } from './open-file';
import type { StructureView } from './structure-schema';

type Format = StructureView['format'];

/** Bytes do not change under their hash, so what they hold is read once while this process lives. */
const known = new KnownStructures();
/** By name too: a sentence about a file that cannot be read says its name to nobody else. */
const asked = new Map<string, Promise<StructureView>>();
const mostAtOnce = 2;

/** What an uploaded file of arrays holds, for whoever may see the file. */
export async function getStructure(actor: Actor, submissionId: string, fileId: string): Promise<Outcome<StructureView>> {
  const file = await openFile(actor, submissionId, fileId);
  if (!file.ok) return file;
  const format = formatByEnding(file.value.name);
  if (format === 'text') return fail('invalid', `${file.value.name} is read as text; only .h5, .hdf5, .npz and .npy have datasets to list.`);
  const key = `${format} ${file.value.sha256}`;
  const before = known.get(key);
  if (before) return ok(before);
  const own = JSON.stringify([submissionId, fileId, key, file.value.name]);
  const running = asked.get(own);
  if (running) return ok(await running);
  if (asked.size >= mostAtOnce) return { ok: false, error: { code: 'limit', sentence: 'Other files are being looked into. Ask again in a few seconds.', retryAfterS: 3 } };
  const reading = look(file.value, format, key).finally(() => asked.delete(own));
  asked.set(own, reading);
  return ok(await reading);
}

/** What failed may have failed in passing, so it is asked anew. */
async function look(file: OpenFile, format: Format, key: string): Promise<StructureView> {
  const found = await readStructure(file.name, format, await file.open());
  if (!found.ok) return { format, entries: [], cut: false, trouble: found.error.map(formatProblem) };
  const view = { ...found.value, trouble: [] };
  known.keep(key, view);
  return view;
}
