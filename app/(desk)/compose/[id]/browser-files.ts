import type { FileView } from '@/lib/services/submissions/submission-view';
import type { ComposerFields } from './fields';

/** Every file that the sheet names. */
export function namedIn({ waveforms, noise }: Pick<ComposerFields, 'waveforms' | 'noise'>): readonly string[] {
  const several = waveforms.flatMap(({ rest }) => Object.values((rest['files'] ?? {}) as Record<string, string>));
  return [...new Set([...waveforms.map(({ file }) => file), ...several, ...noise.flatMap(({ kind, file }) => (kind === 'file' ? [file] : []))])].filter((name) => name !== '');
}

/** The file as this browser was given it; one that was replaced elsewhere is another file. */
export function fileHere(name: string, given: ReadonlyMap<string, Blob>, stored: readonly FileView[]): Blob | null {
  const blob = given.get(name);
  const file = stored.find((one) => one.name === name);
  return blob && (!file || file.bytes === blob.size) ? blob : null;
}
