'use client';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Checkbox, TextareaField, TextField } from '@/app/_ui/primitives/control';
import { Segmented } from '@/app/_ui/primitives/segmented';
import { DECISION_KINDS, DECISION_WORDS, LEVEL_WORDS, type DecisionKind, type DecisionRemark, type Level } from '@/lib/reviews/decision';
import type { DecisionDraftView } from '@/lib/services/reviews/decision-view';
import { Trouble } from '../../../act-parts';
import { useAct } from '../../../use-act';
import { decide } from '../../actions';

interface Fields {
  readonly kind: DecisionKind;
  readonly level: Level;
  readonly remarks: readonly DecisionRemark[];
  readonly prose: string;
  readonly publicSentence: string;
  readonly typed: string;
}

const pointLine = (p: DecisionDraftView['letter']['points'][number]): string => `- ${p.kind === 'must-change' ? 'Must change' : 'Should change'} (${p.anchor.claim}): ${p.text}`;

/** The letter starts from the open threads; the prose, the kind and the level are the editor's. */
export function DecisionForm({ submissionId, draft }: { readonly submissionId: string; readonly draft: DecisionDraftView }) {
  const router = useRouter();
  const best = [...draft.levels].reverse().find((l) => l.open)?.level ?? 1;
  const [fields, setFields] = useState<Fields>({ kind: draft.letter.points.length > 0 || !draft.levels.some((l) => l.open) ? 'back-with-author' : 'enter', level: best, remarks: [], prose: draft.letter.points.map(pointLine).join('\n'), publicSentence: '', typed: '' });
  const set = (change: Partial<Fields>) => setFields((now) => ({ ...now, ...change }));
  const { busy, trouble, run } = useAct(decide, () => router.push(`/review/${submissionId}` as Route));
  const submit = () => {
    const { kind, prose, typed, level, remarks, publicSentence } = fields;
    const sentence = publicSentence.trim();
    void run({ id: submissionId, decision: kind === 'enter' ? { kind, prose, typed, level, remarks: [...remarks], ...(sentence ? { publicSentence: sentence } : {}) } : { kind, prose, typed } });
  };
  return (
    <form className="grid gap-6 rounded border border-hair-2 bg-sheet px-5 py-5" onSubmit={(e) => { e.preventDefault(); submit(); }}>
      <h2>Decision</h2>
      <Segmented legend="Kind" name="kind" value={fields.kind} options={DECISION_KINDS.map((k) => ({ value: k, label: DECISION_WORDS[k] }))} onChange={(kind) => set({ kind })} />
      {fields.kind === 'enter' && <Entering draft={draft} fields={fields} set={set} />}
      <TextareaField label="Letter" className="min-h-[180px]" required maxLength={20_000} value={fields.prose} onChange={(e) => set({ prose: e.target.value })} hint="Markdown with maths. The table of numbers is added by the server; the words are yours. A letter is never changed afterwards." />
      <div className="rounded border border-control px-4 py-3">
        <TextField label={`To sign, type: ${draft.signingWords}`} required autoComplete="off" value={fields.typed} onChange={(e) => set({ typed: e.target.value })} />
      </div>
      <div><Button type="submit" tone="main" size="tall" busy={busy ? 'Deciding' : null}>{DECISION_WORDS[fields.kind]}</Button></div>
      <Trouble trouble={trouble} />
    </form>
  );
}

function Entering({ draft, fields, set }: { readonly draft: DecisionDraftView; readonly fields: Fields; readonly set: (change: Partial<Fields>) => void }) {
  const toggle = (remark: DecisionRemark, on: boolean) => set({ remarks: on ? [...fields.remarks, remark] : fields.remarks.filter((r) => r !== remark) });
  return (
    <>
      <fieldset className="grid gap-3">
        <legend className="mb-1 text-small font-semibold">Level</legend>
        {draft.levels.map((l) => (
          <label key={l.level} className="grid grid-cols-[24px_minmax(0,1fr)] gap-x-2 text-ui">
            <input type="radio" name="level" className="mt-1 size-[18px] accent-link" checked={fields.level === l.level} disabled={!l.open} onChange={() => set({ level: l.level })} />
            <span>
              <strong>{l.level}. {LEVEL_WORDS[l.level]}</strong>
              {l.open ? <span className="block text-ink-2">Covers {l.covers.join(', ')}.</span> : l.refusals.map((r) => <span key={r.code} className="block text-ink-2">{r.text}</span>)}
            </span>
          </label>
        ))}
      </fieldset>
      <fieldset>
        <legend className="mb-1 text-small font-semibold">Remarks</legend>
        {draft.remarks.map((remark) => <Checkbox key={remark} label={remark} checked={fields.remarks.includes(remark)} onChange={(e) => toggle(remark, e.target.checked)} />)}
      </fieldset>
      <TextareaField label="One sentence for the record" maxLength={600} value={fields.publicSentence} onChange={(e) => set({ publicSentence: e.target.value })} hint="Shown on the public page beside the decision. Leave it empty when the numbers say it all." />
    </>
  );
}
