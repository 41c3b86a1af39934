'use client';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { NamedFile, PreviewAsk, PreviewNote } from '../../preview/preview-message';
import { fileHere, namedIn } from './browser-files';
import { sheetFromFields, type ComposerFields } from './fields';
import { guessAsNow } from './guess-as-now';
import type { ComposerForm } from './waveform-part';

/** A moment after the last word, and of files that a browser reads in seconds; larger ones wait for the check. */
const PAUSE_MS = 700;
const MOST_MB = 64;

interface Look {
  readonly sheet: { readonly waveforms: Record<string, unknown>; readonly noise: Record<string, unknown> };
  readonly files: readonly NamedFile[];
}

/** The parts of the sheet whose files are all in this browser, with those files. */
function lookOf({ waveforms, noise }: Pick<ComposerFields, 'waveforms' | 'noise'>, given: ReadonlyMap<string, Blob>, stored: readonly FileView[]): Look {
  const isHere = (parts: Pick<ComposerFields, 'waveforms' | 'noise'>): boolean => {
    const names = namedIn(parts);
    return names.length > 0 && names.every((name) => fileHere(name, given, stored) !== null);
  };
  const near = { waveforms: waveforms.filter((row) => isHere({ waveforms: [row], noise: [] })), noise: noise.filter((row) => isHere({ waveforms: [], noise: [row] })) };
  const sheet = sheetFromFields({ title: '', statement: '', claims: [], ...near });
  const files = namedIn(near).flatMap((name) => { const file = fileHere(name, given, stored); return file ? [{ name, file }] : []; });
  return { sheet, files };
}

interface Looked {
  readonly of: string;
  readonly names: readonly string[];
  readonly guesses: readonly SheetGuess[];
}

const placed = (part: string, name: string): string => `${part}/${name}`;

/** What the files say of the words beside them: of files in this browser at once, of others as the latest check saw it. */
export function useGuesses(form: ComposerForm, given: ReadonlyMap<string, Blob>, stored: readonly FileView[], fromCheck: readonly SheetGuess[]): readonly SheetGuess[] {
  const [waveforms, noise] = form.watch(['waveforms', 'noise']);
  const [looked, setLooked] = useState<Looked | null>(null);
  const worker = useRef<Worker | null>(null);
  const look = lookOf({ waveforms, noise }, given, stored);
  const key = JSON.stringify([look.sheet.waveforms, look.sheet.noise, look.files.map(({ name, file }) => [name, file.size])]);
  const asked = useRef(look);
  asked.current = look; // eslint-disable-line react-hooks/refs -- read by the timer alone, which starts after this drawing
  useEffect(() => {
    const { sheet, files } = asked.current;
    if (files.length === 0 || files.reduce((sum, { file }) => sum + file.size, 0) > MOST_MB * 2 ** 20) return;
    const timer = setTimeout(() => {
      const looking = new Worker(new URL('../../preview/preview-worker.ts', import.meta.url), { type: 'module' });
      worker.current = looking;
      looking.onmessage = ({ data }: MessageEvent<PreviewNote>) => {
        looking.terminate();
        if (data.kind === 'guessed') setLooked({ of: key, names: [...Object.keys(sheet.waveforms).map((name) => placed('waveforms', name)), ...Object.keys(sheet.noise).map((name) => placed('noise', name))], guesses: data.guesses });
      };
      // A look that breaks off leaves what was known; the check looks again.
      looking.onerror = (event) => { event.preventDefault(); looking.terminate(); };
      looking.postMessage({ kind: 'guess', sheet, files } satisfies PreviewAsk);
    }, PAUSE_MS);
    return () => { clearTimeout(timer); worker.current?.terminate(); };
  }, [key]);
  return useMemo(() => {
    const seen = new Set(looked?.names ?? []);
    const all = [...(looked?.guesses ?? []), ...fromCheck.filter(({ part, name }) => !seen.has(placed(part, name)))];
    const sheet = sheetFromFields({ title: '', statement: '', claims: [], waveforms, noise });
    return all.flatMap((guess) => guessAsNow(guess, sheet) ?? []);
  }, [looked, fromCheck, waveforms, noise]);
}
