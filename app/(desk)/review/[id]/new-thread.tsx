'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextareaField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { THREAD_KIND_WORDS, THREAD_KINDS, type ThreadKind, type ThreadVisibility } from '@/lib/reviews/threads';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { openThread } from '../actions';
import { AttachField, type Attachable } from './thread-card';
import type { Place } from '@/lib/kernel/place';

interface NewThreadProps {
  readonly submissionId: string;
  readonly claimId: string;
  readonly isAuthor: boolean;
  readonly places: readonly { readonly at: Place; readonly words: string }[];
  readonly attachable: readonly Attachable[];
}

const visibilityWords: Record<ThreadVisibility, string> = { authors: 'authors, referees and editor', referees: 'referees and editor', 'editor-only': 'the editor alone' };

/** Authors ask and note in the open; demands are the reviewers'. The server asks the same again. */
const kindsFor = (isAuthor: boolean): readonly ThreadKind[] => (isAuthor ? ['question', 'note'] : THREAD_KINDS);

export function NewThread({ submissionId, claimId, isAuthor, places, attachable }: NewThreadProps) {
  const [kind, setKind] = useState<ThreadKind>('question');
  const [visibility, setVisibility] = useState<ThreadVisibility>('authors');
  const [place, setPlace] = useState(0);
  const [body, setBody] = useState('');
  const [variationId, setVariationId] = useState('');
  const { busy, trouble, run } = useAct(openThread, () => { setBody(''); setVariationId(''); });
  const submit = () => {
    const at = places[place]?.at ?? {};
    const anchor = { claim: claimId, at: places.length > 1 ? at : null };
    void run({ id: submissionId, thread: { kind, visibility, anchor, body, ...(variationId ? { variationId } : {}) } });
  };
  return (
    <Disclosure summary={`Comment on ${claimId}`}>
      <form className="grid gap-3 rounded border border-hair-2 bg-sheet px-4 py-3" onSubmit={(e) => { e.preventDefault(); submit(); }}>
        <div className="grid gap-3 sm:grid-cols-3">
          {places.length > 1 && <SelectField label="On which number" value={place} onChange={(e) => setPlace(Number(e.target.value))}>{places.map((p, i) => <option key={i} value={i}>{p.words}</option>)}</SelectField>}
          <SelectField label="Kind" value={kind} onChange={(e) => setKind(e.target.value as ThreadKind)}>{kindsFor(isAuthor).map((k) => <option key={k} value={k}>{THREAD_KIND_WORDS[k]}</option>)}</SelectField>
          {!isAuthor && <SelectField label="Who reads it" value={visibility} onChange={(e) => setVisibility(e.target.value as ThreadVisibility)}>{(['authors', 'referees', 'editor-only'] as const).map((v) => <option key={v} value={v}>{visibilityWords[v]}</option>)}</SelectField>}
        </div>
        <TextareaField label="Comment" value={body} required maxLength={10_000} onChange={(e) => setBody(e.target.value)} hint="Markdown, with maths between dollar signs." />
        <AttachField attachable={attachable} value={variationId} onChange={setVariationId} />
        <div><Button type="submit" tone="main" busy={busy ? 'Opening the thread' : null}>Open the thread</Button></div>
        <Trouble trouble={trouble} />
      </form>
    </Disclosure>
  );
}
