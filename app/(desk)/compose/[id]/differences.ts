import type { DraftSheet } from '@/lib/services/submissions/submission-view';

type Parts = Pick<DraftSheet, 'title' | 'statement' | 'waveforms' | 'noise' | 'claims'>;

export interface Difference {
  readonly part: string;
  /** Null where that version has no such part. */
  readonly mine: string | null;
  readonly theirs: string | null;
}

const shown = (value: unknown): string | null => (value === undefined ? null : typeof value === 'string' ? value : JSON.stringify(sorted(value), null, 1));

/** Keys in one order, so that two writings of the same part compare equal. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, inner]) => [key, sorted(inner)]));
}

/** Part by part: title, statement, each waveform, curve and claim that is not the same in both. */
export function differences(mine: Parts, theirs: Parts): readonly Difference[] {
  const named = (part: 'waveforms' | 'noise', word: string) => [...new Set([...Object.keys(mine[part]), ...Object.keys(theirs[part])])].map((name) => row(`${word} ${name}`, mine[part][name], theirs[part][name]));
  const claimed = (sheet: Parts) => new Map(sheet.claims.map((c, i) => [typeof c['id'] === 'string' && c['id'] ? c['id'] : `${i + 1}`, c]));
  const [own, other] = [claimed(mine), claimed(theirs)];
  const claims = [...new Set([...own.keys(), ...other.keys()])].map((id) => row(`Claim ${id}`, own.get(id), other.get(id)));
  const all = [row('Title', mine.title, theirs.title), row('Statement', mine.statement, theirs.statement), ...named('waveforms', 'Waveform'), ...named('noise', 'Noise curve'), ...claims];
  return all.filter((d) => d.mine !== d.theirs);
}

const row = (part: string, mine: unknown, theirs: unknown): Difference => ({ part, mine: shown(mine), theirs: shown(theirs) });
