import type { ClaimSheet } from '@/lib/claims/claim';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessNoise } from '@/lib/engine/guesses/guess-noise';
import { guessWaveform } from '@/lib/engine/guesses/guess-waveform';
import type { NoiseColumn } from '@/lib/engine/guesses/noise';
import type { Shown } from '@/lib/explain/flips/flip-context';
import { noiseColumnOf } from '../guesses/noise-guesses';
import type { Inputs } from '../read-inputs';

/** From here on a guess speaks against a declaration. */
const SURE = 0.8;

const speaks = ({ agrees, confidence }: Guess): boolean => !agrees && confidence >= SURE;

/** What the samples say against the declaration; the unit of time is no reading of one convention. */
export const shownByWaveform = (waveform: Waveform): Shown[] =>
  guessWaveform(waveform)
    .filter(speaks)
    .flatMap(({ about, convention, proposed, reason }) => (convention === null ? [] : [{ convention, option: about === 'variable' ? proposed : null, reason }]));

/** The reading of the search that makes of the curve in force what the column holds; null where no single one does. */
function columnOption({ meaning: declared, sided }: NoiseColumn, meaning: string): string | null {
  if (declared === 'asd' && meaning === 'characteristic') return 'characteristic';
  if (declared === 'characteristic' && meaning === 'asd') return 'not-characteristic';
  // The root and the square of a spectrum already doubled are √2 and 2 away from what the column says.
  if (sided === 'two') return null;
  if (declared === 'asd' && meaning === 'psd') return 'root';
  return declared === 'psd' && meaning === 'asd' ? 'square' : null;
}

/** Half the power of a published curve, declared whole, is to be doubled; else the spectrum in force is twice the published one. */
function sidedOption({ sided: declared }: NoiseColumn, value: Guess['value']): string | null {
  if (value === 'two') return 'quieter';
  return value === 'one' || declared === 'one' ? 'louder' : null;
}

function optionOf(column: NoiseColumn, { about, value, curve }: Guess): string | null {
  switch (about) {
    case 'noise-column': return columnOption(column, String(value));
    case 'sided': return sidedOption(column, value);
    case 'curve-frequency': return 'angular';
    default: return curve ?? null;
  }
}

/** What the numbers of the claim's own noise table say against its declaration. */
export function shownByNoise(name: string | null, sheet: Pick<ClaimSheet, 'noise'>, inputs: Pick<Inputs, 'noise'>): Shown[] {
  const declaration = name === null ? undefined : sheet.noise.get(name);
  const found = name === null ? undefined : inputs.noise.get(name);
  if (declaration?.kind !== 'table' || !found?.input) return [];
  const column = noiseColumnOf({ declaration, curve: found.input, heads: found.writing });
  if (column === null) return [];
  return guessNoise(column).filter(speaks).flatMap((guess): Shown[] => {
    const option = optionOf(column, guess);
    return option === null || guess.convention === null ? [] : [{ convention: guess.convention, option, reason: guess.reason }];
  });
}
