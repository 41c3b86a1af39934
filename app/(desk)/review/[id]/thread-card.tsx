'use client';
import Link from 'next/link';
import type { Route } from 'next';
import { useState, type ReactNode } from 'react';
import { changesInWords } from '@/app/(public)/variations/variation-words';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextareaField } from '@/app/_ui/primitives/control';
import { Tag } from '@/app/_ui/primitives/tag';
import { anchoredText } from '@/app/views/anchored-text';
import { formatDay, formatInstant } from '@/app/views/dates';
import { formatWithUncertainty } from '@/app/_ui/math/format-uncertainty';
import { placeText } from '@/app/views/place-text';
import { THREAD_KIND_WORDS, THREAD_STATE_WORDS, type Closing } from '@/lib/reviews/threads';
import type { CommentView, ThreadView } from '@/lib/services/reviews/thread-view';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { closeThread, reply } from '../actions';

export interface Attachable {
  readonly id: string;
  readonly words: string;
}
interface ThreadCardProps {
  readonly thread: ThreadView;
  /** The comments' bodies, set; parallel to the comments. */
  readonly bodies: readonly ReactNode[];
  readonly place: string | null;
  readonly attachable: readonly Attachable[];
}

const closingWords: Record<Closing, string> = { resolved: 'Resolve', overruled: 'Overrule', moot: 'Moot after revision' };
const seenBy: Record<ThreadView['visibility'], string> = { 'editor-only': 'the editor alone reads this', referees: 'referees and editor read this', authors: 'authors read this too' };

export function ThreadCard({ thread, bodies, place, attachable }: ThreadCardProps) {
  const { anchor } = thread;
  return (
    <article data-listed tabIndex={-1} className="rounded border border-hair-2 bg-sheet px-4 py-3" aria-label={`Thread ${thread.number}`}>
      <header className="flex flex-wrap items-center gap-2">
        <h5 className="font-semibold">{thread.number}. {THREAD_KIND_WORDS[thread.kind]}</h5>
        {place && <Tag>{place}</Tag>}
        <Tag>{THREAD_STATE_WORDS[thread.state]}</Tag>
        <span className="ml-auto text-small text-ink-2">{seenBy[thread.visibility]}</span>
      </header>
      {anchor.now.standing === 'changed' && <p className="mt-1 text-small text-ink-2">Opened on revision {anchor.openedOnRevision}. This number changed: {anchoredText(anchor.now.was)} → {anchoredText(anchor.now.now)}</p>}
      {anchor.now.standing === 'lost' && <p className="mt-1 text-small text-ink-2">Opened on revision {anchor.openedOnRevision}; the number it hung on is no longer claimed.</p>}
      {thread.comments.map((comment, i) => <Comment key={comment.id} comment={comment} body={bodies[i]} />)}
      {thread.may.reply && <Reply thread={thread} attachable={attachable} />}
    </article>
  );
}

function Comment({ comment, body }: { readonly comment: CommentView; readonly body: ReactNode }) {
  const { when, variation } = comment;
  return (
    <div className="mt-3 border-t border-hair-2 pt-3">
      <p className="text-small text-ink-2"><strong className="text-ink">{comment.by}</strong>{comment.yours && ' (you)'} · {when.precision === 'day' ? formatDay(when.on) : formatInstant(when.at)}</p>
      <div className="mt-1">{body}</div>
      {variation && (
        <div className="mt-2 rounded border border-dashed border-control px-3 py-2 text-ui">
          <p className="font-semibold">Variation: <Link href={`/variations/${variation.id}` as Route} className="inline-flex min-h-8 items-center">{changesInWords(variation.changed)}</Link></p>
          {variation.points.map((point, i) => <p key={i}>{variation.points.length > 1 && `${placeText(point.at)}: `}{formatWithUncertainty(point.value, point.expandedUncertainty, variation.unit)}{point.official !== null && <span className="text-ink-2"> (official: {formatWithUncertainty(point.official, point.officialUncertainty, variation.unit)})</span>}</p>)}
          <p className="text-small text-ink-2">A rerun with other settings. It changes no number of the record.</p>
        </div>
      )}
    </div>
  );
}

function Reply({ thread, attachable }: { readonly thread: ThreadView; readonly attachable: readonly Attachable[] }) {
  const [body, setBody] = useState('');
  const [variationId, setVariationId] = useState('');
  const answer = useAct(reply, () => { setBody(''); setVariationId(''); });
  const close = useAct(closeThread);
  return (
    <form className="mt-3 grid gap-2 border-t border-hair-2 pt-3" onSubmit={(e) => { e.preventDefault(); void answer.run({ id: thread.id, reply: { body, ...(variationId ? { variationId } : {}) } }); }}>
      <TextareaField label={`Reply to thread ${thread.number}`} value={body} required maxLength={10_000} onChange={(e) => setBody(e.target.value)} hint="Markdown, with maths between dollar signs." />
      <AttachField attachable={attachable} value={variationId} onChange={setVariationId} />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" size="low" tone="main" busy={answer.busy ? 'Replying' : null}>Reply</Button>
        {thread.may.close.map((closing) => <Button key={closing} size="low" busy={close.busy ? 'Closing' : null} onClick={() => void close.run({ id: thread.id, closing })}>{closingWords[closing]}</Button>)}
      </div>
      <Trouble trouble={answer.trouble ?? close.trouble} />
    </form>
  );
}

export function AttachField({ attachable, value, onChange }: { readonly attachable: readonly Attachable[]; readonly value: string; readonly onChange: (id: string) => void }) {
  if (attachable.length === 0) return null;
  return (
    <SelectField label="Attach a variation" value={value} onChange={(e) => onChange(e.target.value)} hint="Those who read the comment then see it, with its note. It is attached once.">
      <option value="">none</option>
      {attachable.map((v) => <option key={v.id} value={v.id}>{v.words}</option>)}
    </SelectField>
  );
}
