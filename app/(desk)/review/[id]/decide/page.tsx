import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { reportAsView } from '@/app/views/record-as-view';
import { Prose } from '@/app/_ui/math/render-markdown';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Tag } from '@/app/_ui/primitives/tag';
import { Notice } from '@/app/_ui/primitives/notice';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import { loadFor } from '@/lib/http/page-guard';
import type { Actor } from '@/lib/policy/actor';
import { RULES_SENTENCE } from '@/lib/badges/cautions';
import { THREAD_KIND_WORDS, THREAD_STATE_WORDS } from '@/lib/reviews/threads';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import type { DeskView } from '@/lib/services/reviews/desk-view';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { getReview } from '@/lib/services/submissions/get-lodged';
import type { LodgedView } from '@/lib/services/submissions/submission-view';
import { LetterNumbers } from '../letters';
import { DecisionForm } from './decision-form';

export const metadata: Metadata = { title: 'Decide' };

async function loadAll(actor: Actor, id: string) {
  const [desk, draft, lodged] = [await getDesk(actor, id), await draftDecision(actor, id), await getReview(actor, id)];
  if (!desk.ok) return desk;
  if (!draft.ok) return draft;
  return lodged.ok ? { ok: true as const, value: { desk: desk.value, draft: draft.value, lodged: lodged.value } } : lodged;
}

function Strip({ lodged }: { readonly lodged: LodgedView }) {
  const result = lodged.run?.state === 'measured' ? lodged.run.result : null;
  if (!result) return <p className="text-ui text-ink-2">There is no finished run of this revision.</p>;
  return <p className="flex flex-wrap items-center gap-3 text-ui"><VerdictStrip verdicts={result.claims} /> {result.claims.map((c) => `${c.id} ${c.verdict.replace('-', ' ')}`).join(', ')} · engine {result.engine}</p>;
}

function OpenThreads({ desk }: { readonly desk: DeskView }) {
  const open = desk.threads.filter((t) => t.state === 'open' || t.state === 'answered');
  return (
    <section aria-labelledby="open-h">
      <h2 id="open-h" className="mb-2">Open threads <span className="text-ink-2">{open.length}</span></h2>
      {open.length === 0 && <p className="text-ui text-ink-2">None. Whatever was asked is settled.</p>}
      <ul className="grid gap-3">
        {open.map((t) => (
          <li key={t.id} className="rounded border border-hair-2 bg-sheet px-4 py-3">
            <p className="mb-1 flex flex-wrap items-center gap-2 text-ui"><strong>{t.number}. {THREAD_KIND_WORDS[t.kind]}</strong> on {t.anchor.claim} <Tag>{THREAD_STATE_WORDS[t.state]}</Tag></p>
            <Prose source={t.comments[0]?.body ?? ''} />
          </li>
        ))}
      </ul>
    </section>
  );
}

export default async function Decide({ params }: { readonly params: Promise<{ readonly id: string }> }) {
  const { id } = await params;
  const { desk, draft, lodged } = await loadFor(`/review/${id}/decide`, (actor) => loadAll(actor, id));
  return (
    <div className="wrap grid gap-8 pt-10">
      <div>
        <p className="flex flex-wrap items-center gap-x-3 text-ui text-ink-2">{desk.stateWords}, revision {desk.revision} <Link className="inline-flex min-h-8 items-center" href={`/review/${id}` as Route}>Read the claims and threads</Link></p>
        <h1>Decide on “{desk.title}”</h1>
        <div className="mt-2"><Strip lodged={lodged} /></div>
      </div>
      <section aria-labelledby="numbers-h"><h2 id="numbers-h" className="mb-2">Numbers of the letter</h2><LetterNumbers numbers={draft.letter.numbers} /></section>
      <section aria-labelledby="reports-h">
        <h2 id="reports-h" className="mb-2">Reports <span className="text-ink-2">{desk.reports.length}</span></h2>
        {desk.reports.map(reportAsView).map((r, i) => <Disclosure key={i} summary={`${r.who}, round ${r.round}: ${r.recommendation}`}><Prose source={r.text} /></Disclosure>)}
      </section>
      <OpenThreads desk={desk} />
      {desk.may.decide ? <DecisionForm submissionId={id} draft={draft} /> : <Notice kind="note" actions={<LinkButton href={`/review/${id}`}>Back to the desk</LinkButton>}>No decision can be made now: the submission is {desk.stateWords.toLowerCase()}.</Notice>}
      <p className="max-w-measure text-small text-ink-2">{RULES_SENTENCE}</p>
    </div>
  );
}
