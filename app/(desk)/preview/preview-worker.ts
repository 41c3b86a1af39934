/**
 * A first look in a thread of the reader's own browser: the same pure pipeline that the server runs,
 * over files that stay where they are. The policy this script is served with lets it load scripts of
 * this site and connect to nothing.
 */
import { BlobReader } from '@zip.js/zip.js';
import { z } from 'zod';
import { openArchive } from '@/lib/formats/archive';
import { FileRefused, type OpenFile } from '@/lib/formats/open-file';
import { Sha256 } from '@/lib/formats/sha256';
import { guessFiles } from '@/lib/pipeline/guesses/guess-files';
import { preview } from '@/lib/pipeline/preview';
import type { Source } from '@/lib/pipeline/reproduce-with';
import type { NamedFile, PreviewAsk, PreviewNote } from './preview-message';

// Without this the library tries whether code may be evaluated, and the policy reports the try.
z.config({ jitless: true });

const tell = (note: PreviewNote): void => self.postMessage(note);

self.onmessage = (event: MessageEvent<PreviewAsk>): void => {
  void look(event.data);
};

async function look(ask: PreviewAsk): Promise<void> {
  if (ask.kind === 'files') return run({ sheetJson: ask.sheet, openFile: openAmong(ask.files) });
  if (ask.kind === 'guess') return tell({ kind: 'guessed', guesses: await guessFiles(ask.sheet, { openFile: openAmong(ask.files) }, () => new Sha256()) });
  const opened = await openArchive(new BlobReader(ask.archive), ask.name);
  if (!opened.ok) return tell({ kind: 'refused', problems: opened.error });
  await run(opened.value);
}

async function run(source: Source): Promise<void> {
  const seen = await preview(source, { onProgress: (fraction, doing) => tell({ kind: 'progress', fraction, doing }), digest: () => new Sha256() });
  tell(seen.ok ? { kind: 'done', preview: seen.value } : { kind: 'refused', problems: seen.error });
}

/** Only files that were handed over. */
function openAmong(files: readonly NamedFile[]): OpenFile {
  const byName = new Map(files.map(({ name, file }) => [name, file]));
  return (name) => {
    const file = byName.get(name);
    if (!file) throw new FileRefused('no file of this name among those this browser was given', 'the file beside the claim sheet', 'Add the file, or correct its name in the sheet.');
    return chunksOf(file);
  };
}

async function* chunksOf(file: Blob): AsyncGenerator<Uint8Array> {
  const reader = file.stream().getReader();
  try {
    for (let part = await reader.read(); !part.done; part = await reader.read()) yield part.value;
  } finally {
    await reader.cancel().catch(() => undefined);
  }
}
