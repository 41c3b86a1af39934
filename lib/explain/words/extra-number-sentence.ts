import type { ClaimOnGrid, ReadingOnGrid } from '../search/extra-number';
import { capital, listOf, measuredNumber } from './numbers';
import { placeOf } from './places';

type Predicted = Pick<ReadingOnGrid, 'candidate' | 'clause'> & { readonly value: number; readonly expandedUncertainty: number | null };

/** A request to the author, with what each reading gives, so that the answer can be read off. */
export function extraNumberSentence({ title, unit, setting, settingUnit }: ClaimOnGrid, at: number, predictions: readonly Predicted[]): string {
  const given = predictions.map(({ candidate, clause, value, expandedUncertainty }) => `${measuredNumber(value, expandedUncertainty, unit)} ${candidate === null ? 'with the stated settings' : `if ${clause}`}`);
  return `${capital(title)} at ${placeOf(setting, at, settingUnit)} would tell these apart: ${listOf(given)}. Could you state the number that you find there?`;
}
