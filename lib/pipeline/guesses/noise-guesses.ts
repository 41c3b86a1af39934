import { pointer } from '@/lib/claims/pointer';
import type { NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessNoise } from '@/lib/engine/guesses/guess-noise';
import type { NoiseColumn } from '@/lib/engine/guesses/noise';
import type { Json, Placed } from './waveform-guesses';

type Table = Extract<NoiseDeclaration, { kind: 'table' }>;

/** A noise table of the sheet as it was declared and read. */
export interface DeclaredNoise {
  readonly raw: Json;
  readonly declaration: Table;
  readonly curve: NoiseCurve;
  readonly heads: readonly { readonly text: string }[];
}

/** The column as the file has it: what was declared of it is undone. */
export function noiseColumnOf({ declaration, curve, heads }: Omit<DeclaredNoise, 'raw'>): NoiseColumn | null {
  const role = declaration.columns.map((column) => column.role).find(({ kind }) => kind === 'noise');
  const f = curve.points;
  if (role?.kind !== 'noise' || f === null) return null;
  const { meaning } = role;
  const values = f.map((fHz) => {
    const power = curve.psd(fHz) / (declaration.sided === 'two' ? 2 : 1);
    return meaning === 'psd' ? power : Math.sqrt(meaning === 'asd' ? power : power * fHz);
  });
  return { name: declaration.name, f, values, meaning, sided: declaration.sided, writing: heads.map(({ text }) => text) };
}

function place(guess: Guess, { raw, declaration }: DeclaredNoise): Placed {
  const at = (name: string): string => pointer('noise', declaration.name, name);
  const columns = Array.isArray(raw['columns']) ? raw['columns'].map(String) : [];
  switch (guess.about) {
    case 'noise-column': {
      const changes = guess.agrees ? [] : [{ field: at('columns'), value: columns.map((name) => (name === guess.declared ? String(guess.value) : name)) }];
      return { guess, field: at('columns'), isDeclared: true, value: columns.join(' '), changes };
    }
    case 'sided': return { guess, field: at('sided'), isDeclared: raw['sided'] !== undefined, value: declaration.sided, changes: guess.value === null ? null : [{ field: at('sided'), value: guess.value }] };
    case 'curve-frequency': return { guess, field: at('columns'), isDeclared: true, value: columns.join(' '), changes: null };
    default: return { guess, field: at('file'), isDeclared: true, value: declaration.file, changes: null };
  }
}

/** What the numbers of one noise table say of its declaration. */
export function noiseGuesses(of: DeclaredNoise): readonly Placed[] {
  const column = noiseColumnOf(of);
  return column === null ? [] : guessNoise(column).map((guess) => place(guess, of));
}
