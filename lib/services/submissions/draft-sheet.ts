import type { DraftSheet } from './submission-view';

export const EMPTY_SHEET: DraftSheet = { format: 'counterfoil-claim/1', title: '', statement: '', waveforms: {}, noise: {}, claims: [] };

const isRecord = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null && !Array.isArray(value);

/** What was stored, as a sheet: parts that are absent are empty. Whether it can be computed is for the claim room to say. */
export function asDraftSheet(stored: unknown, words: { readonly title: string; readonly statement: string }): DraftSheet {
  const sheet = isRecord(stored) ? stored : {};
  return {
    ...sheet,
    format: 'counterfoil-claim/1',
    title: words.title,
    statement: words.statement,
    waveforms: (isRecord(sheet['waveforms']) ? sheet['waveforms'] : {}) as DraftSheet['waveforms'],
    noise: (isRecord(sheet['noise']) ? sheet['noise'] : {}) as DraftSheet['noise'],
    claims: (Array.isArray(sheet['claims']) ? sheet['claims'] : []) as DraftSheet['claims'],
  };
}
