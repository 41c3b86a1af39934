import { parseNoise } from '@/lib/claims/noise';
import { parseWaveform } from '@/lib/claims/waveform';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import type { Problem } from '@/lib/kernel/problem';
import { HashedFiles, type StreamingDigest } from '../hashed-files';
import { readInputs } from '../read-inputs';
import type { Source } from '../reproduce-with';
import { sheetGuesses } from './sheet-guesses';
import type { SheetGuess } from './sheet-guess';

const entries = (part: unknown): [string, unknown][] => (typeof part === 'object' && part !== null ? Object.entries(part) : []);
const curves = builtInCurves.map(({ id }) => id);

/** Read by itself each, so that one file that is not yet what the sheet says keeps no other from being looked at. */
export async function guessFiles(sheetJson: unknown, { openFile, readHdf5 }: Pick<Source, 'openFile' | 'readHdf5'>, digest: () => StreamingDigest): Promise<readonly SheetGuess[]> {
  const sheet = (sheetJson ?? {}) as Readonly<Record<string, unknown>>;
  const files = new HashedFiles(openFile, digest);
  const found: SheetGuess[] = [];
  const words: Problem[] = [];
  const declared = (['waveforms', 'noise'] as const).flatMap((part) => entries(sheet[part]).map(([name, entry]) => ({ part, name, entry })));
  for (const { part, name, entry } of declared) {
    const waveform = part === 'waveforms' ? parseWaveform(name, entry, words) : null;
    const noise = part === 'noise' ? parseNoise(name, entry, curves, words) : null;
    const parts = { waveforms: new Map(waveform ? [[name, waveform]] : []), noise: new Map(noise ? [[name, noise]] : []) };
    const inputs = await readInputs({ title: '', statement: '', claims: [], ...parts }, files, () => undefined, readHdf5 ?? null);
    if (inputs.ok) found.push(...sheetGuesses(sheetJson, parts, inputs.value));
  }
  return found;
}
