/**
 * To print: one number with everything it rests on, as a sentence and as a row of a LaTeX table.
 * Pure functions of the result and of what the page knows; nothing here decides or rounds anew.
 */
import type { ResultDocument } from '@/lib/pipeline/result';
import type { RecordView } from '../record-view';

/** Where the number may be looked up again. */
export interface PrintSource {
  readonly kind: 'record' | 'submission' | 'draft';
  readonly id: string;
  readonly revision: number;
  /** Whole address of a published record. */
  readonly address: string | null;
  /** `struck`, `lapsed` and the like; null while it stands or is not published. */
  readonly standing: string | null;
  readonly engine: string | null;
  readonly files: ResultDocument['files'];
}

const standings: Readonly<Record<string, string>> = { 'under-recheck': 'under recheck' };

export function printSourceOf(view: RecordView): PrintSource {
  const published = view.mode === 'public';
  const standing = view.standing && view.standing !== 'entered' ? (standings[view.standing] ?? view.standing) : null;
  return {
    kind: published ? 'record' : view.mode === 'draft' ? 'draft' : 'submission',
    id: view.id,
    revision: view.revision,
    address: published ? (view.address ?? null) : null,
    standing: published ? standing : null,
    engine: view.engine,
    files: view.result?.files ?? [],
  };
}

/** `Counterfoil record 90tf-w8a1, revision 2, https://…` or that it is not entered. */
export function sourceWords(source: PrintSource): string {
  const { kind, id, revision, address, standing } = source;
  if (kind !== 'record') return `Counterfoil ${kind} ${id}, not yet entered, revision ${revision}`;
  return `Counterfoil record ${id}${standing ? ` (${standing})` : ''}, revision ${revision}, ${address ?? 'address unknown'}`;
}

/** Twelve digits tell files apart; the record has them all. */
export const shortDigest = (files: PrintSource['files'], name: string): string => {
  const digest = files.find((file) => file.name === name)?.sha256;
  return digest ? `SHA-256 ${digest.slice(0, 12)}` : 'SHA-256 unknown';
};
