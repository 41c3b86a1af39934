'use client';
import { useState } from 'react';
import { say } from '@/app/_ui/primitives/toaster';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { fieldsFromSheet, sheetFromFields, type ComposerFields } from './fields';
import { isEmptySheet, mergeSheets, readClaimJson } from './import-sheet';
import type { ComposerForm } from './waveform-part';

export const sheetOf = (fields: ComposerFields): DraftSheet => ({ format: 'counterfoil-claim/1', title: fields.title, statement: fields.statement, ...sheetFromFields(fields) });

/** A `claim.json` into the form: at once where nothing is written yet, else as its author chooses. Each way can be undone. */
export function useImport(form: ComposerForm, put: (fields: ComposerFields) => void) {
  const [incoming, setIncoming] = useState<DraftSheet | null>(null);
  const [trouble, setTrouble] = useState<readonly string[] | null>(null);

  const apply = (sheet: DraftSheet, words: string) => {
    const before = structuredClone(form.getValues());
    put(fieldsFromSheet(sheet));
    setIncoming(null);
    say(words, () => put(before));
  };
  const take = (text: string) => {
    const read = readClaimJson(text);
    setTrouble(read.ok ? null : read.error);
    if (!read.ok) return;
    if (isEmptySheet(sheetOf(form.getValues()))) apply(read.value, 'claim.json is filled in.');
    else setIncoming(read.value);
  };
  const replace = () => { if (incoming) apply(incoming, 'The sheet is replaced by claim.json.'); };
  const merge = () => {
    if (!incoming) return;
    const { sheet, renamed } = mergeSheets(sheetOf(form.getValues()), incoming);
    apply(sheet, ['claim.json is added.', ...renamed.map((words) => `${words}.`)].join(' '));
  };
  return { incoming, trouble, take, replace, merge, leave: () => { setIncoming(null); setTrouble(null); } };
}
