import { pointer } from '@/lib/claims/pointer';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { peakOf } from '@/lib/engine/findings/loud-modes';
import { TINY } from '@/lib/engine/guesses/amplitude';
import { guessBinary, type StatedBodies } from '@/lib/engine/guesses/binary';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessWaveform } from '@/lib/engine/guesses/guess-waveform';
import { massSum, stated, type StatedName } from '@/lib/formats/stated-masses';
import type { SheetChange } from './sheet-guess';

export type Json = Readonly<Record<string, unknown>>;

/** Where a guess stands in the sheet, what stands there now, and what would say what the data say. */
export interface Placed {
  readonly guess: Guess;
  readonly field: string;
  readonly isDeclared: boolean;
  readonly value: string | number | null;
  readonly changes: readonly SheetChange[] | null;
}

/** A waveform of the sheet as it was declared and read. */
export interface DeclaredWaveform {
  readonly raw: Json;
  readonly declaration: WaveformDeclaration;
  readonly waveform: Waveform;
  readonly heads: readonly { readonly text: string }[];
}

const word = (value: unknown): string | number | null => (typeof value === 'string' || typeof value === 'number' ? value : null);
const turned = { 'plus-minus-i-cross': 'plus-plus-i-cross', 'plus-plus-i-cross': 'plus-minus-i-cross' } as const;

type At = (...path: readonly string[]) => string;

/** Modes of m < 0 out of the sheet, so that the mirror rule makes them; null where no word names them one by one. */
function withoutMinus(raw: Json, at: At): SheetChange[] | null {
  const mirror: SheetChange = { field: at('negativeM'), value: 'mirror' };
  const { columns, files } = raw;
  if (Array.isArray(columns) && columns.some((name) => /\d,?-\d+$/.test(String(name))))
    return [{ field: at('columns'), value: columns.map((name) => (/^(re|im|amplitude|amp|phase)\d{1,2},?-\d+$/.test(String(name)) ? '_' : String(name))) }, mirror];
  if (typeof files !== 'object' || files === null) return null;
  const kept = Object.entries(files as Record<string, string>).filter(([mode]) => !/,\s*-/.test(mode));
  return [{ field: at('files'), value: Object.fromEntries(kept) }, mirror];
}

const isTiny = ({ content }: Waveform): boolean => content.kind === 'modes' && content.modes.some(({ l, m }) => l === 2 && m === 2) && content.modes.every((mode) => peakOf(mode) < TINY);

/** Time and amplitude are both physical or both in M. */
function unitChanges({ value }: Guess, waveform: Waveform, at: At): SheetChange[] | null {
  if (value === 's') return isTiny(waveform) ? [{ field: at('timeUnit'), value: 's' }, { field: at('amplitudeUnit'), value: 'strain' }] : null;
  return isTiny(waveform) ? null : [{ field: at('timeUnit'), value: 'M' }, { field: at('amplitudeUnit'), value: 'rh/M' }];
}

function variableChanges({ value }: Guess, { raw, declaration }: DeclaredWaveform, at: At): SheetChange[] | null {
  if (declaration.timeUnit !== 'M') return null;
  return [{ field: at('variable'), value: String(value) }, ...(value !== 'psi4' && raw['psi4Factor'] !== undefined ? [{ field: at('psi4Factor'), value: null }] : [])];
}

function exchanged({ binary: { chi1z, chi2z } }: WaveformDeclaration, at: At): SheetChange[] {
  if (chi1z === undefined && chi2z === undefined) return [];
  return [{ field: at('binary', 'chi1z'), value: chi2z ?? null }, { field: at('binary', 'chi2z'), value: chi1z ?? null }];
}

function factorChanges({ value }: Guess, { declaration }: DeclaredWaveform, at: At): SheetChange[] | null {
  const factor = declaration.psi4Factor * Number(value);
  return declaration.variable === 'psi4' && [0.5, 1, 2].includes(factor) ? [{ field: at('psi4Factor'), value: factor }] : null;
}

/** From what was guessed to the word of the sheet that says it. */
function place(guess: Guess, of: DeclaredWaveform): Placed {
  const { raw, declaration, waveform } = of;
  const at: At = (...path) => pointer('waveforms', declaration.name, ...path);
  const binary = (raw['binary'] ?? {}) as Json;
  const top = (name: string, value: string | number | null, changes: readonly SheetChange[] | null): Placed => ({ guess, field: at(name), isDeclared: raw[name] !== undefined, value, changes: guess.agrees ? (value === null ? null : [{ field: at(name), value }]) : changes });
  const inBinary = (name: string, changes: readonly SheetChange[] | null): Placed => ({ guess, field: at('binary', name), isDeclared: binary[name] !== undefined, value: word(binary[name]), changes: guess.agrees ? [] : changes });
  switch (guess.about) {
    case 'rotation': return top('polarisation', declaration.polarisation, [{ field: at('polarisation'), value: turned[declaration.polarisation] }]);
    case 'negative-m': return top('negativeM', declaration.negativeM ?? 'given', withoutMinus(raw, at));
    case 'time-unit': return top('timeUnit', declaration.timeUnit, unitChanges(guess, waveform, at));
    case 'variable': return top('variable', declaration.variable, variableChanges(guess, of, at));
    case 'normalisation': return declaration.variable === 'psi4' ? top('psi4Factor', declaration.psi4Factor, factorChanges(guess, of, at)) : top('amplitudeUnit', declaration.amplitudeUnit, null);
    case 'mass-ratio': return inBinary('massRatio', [{ field: at('binary', 'massRatio'), value: guess.value }, ...((declaration.binary.massRatio ?? 1) < 1 ? exchanged(declaration, at) : [])]);
    case 'labels': return inBinary('chi1z', exchanged(declaration, at));
    case 'spin': {
      const name = guess.declared.startsWith('chi2z') ? 'chi2z' : 'chi1z';
      return inBinary(name, guess.value === null ? null : [{ field: at('binary', name), value: guess.value }]);
    }
    default: return top('totalMassMsun', word(raw['totalMassMsun']), null);
  }
}

const bodiesOf = (heads: DeclaredWaveform['heads']): StatedBodies => {
  const of = (name: StatedName): number | null => stated(heads, name)?.value ?? null;
  return { mass1: of('mass1'), mass2: of('mass2'), ratio: of('ratio'), spin1: of('spin1'), spin2: of('spin2'), effectiveSpin: of('effectiveSpin') };
};

/** Masses of the head that do not add up to the total, and what they then are. */
function sumGuess({ mass1, mass2 }: StatedBodies, { name, totalMassMsun, binary }: WaveformDeclaration): Guess[] {
  const off = mass1 === null || mass2 === null ? null : massSum(mass1, mass2, totalMassMsun, binary);
  if (off === null || off.looksLike === null) return [];
  const sum = String(Number(off.sum.toPrecision(5)));
  return [{ about: 'total-mass', convention: 'C12', declared: 'the sum of the masses', proposed: `${off.looksLike}, not the sum`, value: null, agrees: false, confidence: 0.7, reason: `The masses in the head of ${name} add to ${sum} ${off.unit} instead of ${Number(off.total.toPrecision(5))} ${off.unit}; that looks like ${off.looksLike}.` }];
}

const read = new Set(['strain', 'news', 'psi4']);

/** What samples and heads of one waveform say of its declaration. */
export function waveformGuesses(of: DeclaredWaveform): readonly Placed[] {
  const { declaration, waveform, heads } = of;
  if (!read.has(declaration.variable)) return [];
  const bodies = bodiesOf(heads);
  return [...guessWaveform(waveform), ...guessBinary(declaration.name, declaration.binary, bodies), ...sumGuess(bodies, declaration)].map((guess) => place(guess, of));
}
