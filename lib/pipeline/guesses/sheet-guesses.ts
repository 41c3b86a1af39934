import type { NoiseDeclaration, WaveformDeclaration } from '@/lib/engine/contract/layout';
import { conventions } from '@/lib/explain/conventions/conventions';
import type { Inputs } from '../read-inputs';
import { noiseGuesses } from './noise-guesses';
import type { SheetGuess } from './sheet-guess';
import { waveformGuesses, type Json, type Placed } from './waveform-guesses';

/** What of a sheet is declared beside its files, whatever becomes of its claims. */
export interface DeclaredParts {
  readonly waveforms: ReadonlyMap<string, WaveformDeclaration>;
  readonly noise: ReadonlyMap<string, NoiseDeclaration>;
}

const rows = new Map(conventions.map((row) => [row.id, row]));
const object = (value: unknown): Json => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Json) : {});

function asked(part: SheetGuess['part'], name: string, { guess, field, isDeclared, value, changes }: Placed): SheetGuess {
  const row = guess.convention === null ? undefined : rows.get(guess.convention);
  return {
    about: guess.about, part, name, field,
    standing: isDeclared ? 'declared' : 'assumed',
    value, agrees: guess.agrees, proposed: guess.proposed, changes,
    reason: guess.reason, confidence: guess.confidence,
    convention: row ? { id: row.id, title: row.title, sentence: row.sentence } : null,
  };
}

/**
 * All guesses of a sheet: what its files say of the words beside them.
 * Shape:  in the order of the sheet, waveforms before noise; a file that could not be read gives none.
 * Units:  as declared.
 * Error:  each guess states its confidence and its reason.
 * Fails:  never.
 * Source: domain reference, 4.2.
 */
export function sheetGuesses(sheetJson: unknown, { waveforms, noise }: DeclaredParts, inputs: Pick<Inputs, 'waveforms' | 'noise'>): readonly SheetGuess[] {
  const raw = object(sheetJson);
  const rawOf = (part: SheetGuess['part'], name: string): Json => object(object(raw[part])[name]);
  const ofWaveforms = [...waveforms.values()].flatMap((declaration) => {
    const found = inputs.waveforms.get(declaration.name);
    if (!found?.input) return [];
    return waveformGuesses({ raw: rawOf('waveforms', declaration.name), declaration, waveform: found.input, heads: found.writing }).map((placed) => asked('waveforms', declaration.name, placed));
  });
  const ofNoise = [...noise.values()].flatMap((declaration) => {
    const found = inputs.noise.get(declaration.name);
    if (!found?.input || declaration.kind !== 'table') return [];
    return noiseGuesses({ raw: rawOf('noise', declaration.name), declaration, curve: found.input, heads: found.writing }).map((placed) => asked('noise', declaration.name, placed));
  });
  return [...ofWaveforms, ...ofNoise];
}

/** A bank of templates says the same a thousand times; a result keeps so many. */
const MOST_KEPT = 200;

/** Contradictions first, then what nobody declared. */
const weight = ({ agrees, standing }: SheetGuess): number => (agrees ? 2 : 0) + (standing === 'declared' ? 1 : 0);

/** Those that travel with a result, in the order of the sheet. */
export function keptGuesses(guesses: readonly SheetGuess[]): readonly SheetGuess[] {
  if (guesses.length <= MOST_KEPT) return guesses;
  const kept = new Set([...guesses].sort((p, q) => weight(p) - weight(q)).slice(0, MOST_KEPT));
  return guesses.filter((guess) => kept.has(guess));
}
