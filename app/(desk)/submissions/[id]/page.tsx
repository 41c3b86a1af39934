import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { askedVariation, type AskedVariation, type VariationQuery } from '@/app/(public)/variations/asked-variation';
import { variationSlot } from '@/app/(public)/variations/variation-slot';
import { RecordPage } from '@/app/_ui/claim/record-page';
import type { RecordSlots } from '@/app/_ui/claim/record-view';
import { Card } from '@/app/_ui/primitives/card';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { decisionOf } from '@/app/views/decision-as-view';
import { reportAsView } from '@/app/views/record-as-view';
import { submissionAsView } from '@/app/views/submission-as-view';
import { loadFor } from '@/lib/http/page-guard';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { NOT_FOUND } from '@/lib/services/app-error';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { listVariations } from '@/lib/services/variations/list-variations';
import { isUnderWay } from '@/lib/services/runs/under-way';
import { ActButton } from '../../act-parts';
import { candidateSlots, isLatest } from '../../candidates/candidate-slots';
import { confirmAuthorship, revise } from '../../compose/actions';
import { ClaimDiscussion } from '../../review/[id]/claim-discussion';
import { Letters } from '../../review/[id]/letters';
import { changeAt, ThreadAnchor } from '../../review/[id]/thread-anchor';
import { Duplicate } from '../duplicate';
import { FollowRun } from './follow-run';
import { Withdraw } from './withdraw';

export const metadata: Metadata = { title: 'Submission' };

interface PageProps {
  readonly params: Promise<{ readonly id: string }>;
  readonly searchParams: Promise<VariationQuery & { readonly revision?: string }>;
}

/** The authors' own view: a draft of theirs answers too, so that the page can lead them to it. */
async function loadAll(actor: Actor, id: string, wanted: number | undefined) {
  const draft = await getDraft(actor, id);
  if (!draft.ok) return draft;
  const lodged = await getReview(actor, id, wanted);
  if (!lodged.ok && draft.value.revision.lodgedAt === null && draft.value.revision.number === 1) return { ok: true as const, value: null };
  const desk = await getDesk(actor, id);
  if (!lodged.ok) return lodged;
  if (!desk.ok) return desk;
  if (desk.value.you.role !== 'author' && desk.value.you.role !== 'co-author') return { ok: false as const, error: NOT_FOUND };
  const variations = lodged.value.may.vary && isSignedIn(actor) ? await listVariations(actor, id, lodged.value.revision.number) : null;
  return { ok: true as const, value: { you: isSignedIn(actor) ? actor.userId : '', draft: draft.value, lodged: lodged.value, desk: desk.value, variations: variations?.ok ? variations.value : null } };
}

type Loaded = NonNullable<Extract<Awaited<ReturnType<typeof loadAll>>, { ok: true }>['value']>;

function slotsFor({ you, draft, lodged, desk, variations }: Loaded, asked: AskedVariation | null): RecordSlots {
  const result = lodged.run?.state === 'measured' ? lodged.run.result : null;
  const pointsOf = (claimId: string) => result?.claims.find((c) => c.id === claimId)?.points ?? [];
  return {
    anchor: (claimId, point) => <ThreadAnchor threads={desk.threads} claimId={claimId} at={pointsOf(claimId)[point]?.at ?? {}} single={pointsOf(claimId).length === 1} />,
    change: (claimId, point) => changeAt(desk.changes, claimId, pointsOf(claimId)[point]?.at ?? {}),
    action: variationSlot({ revision: { submissionId: lodged.id, revision: lodged.revision.number, sheet: lodged.revision.sheet }, result, variations, asked }),
    ...candidateSlots({ submissionId: lodged.id, runId: lodged.run?.id ?? null, answers: lodged.candidateAnswers, mayAnswer: lodged.may.answerCandidates, mayTakeOver: draft.may.edit, mayAsk: false, varyAt: variations && isLatest(lodged) ? `/submissions/${lodged.id}` : null }),
    discussion: (claimId) => <ClaimDiscussion desk={desk} claimId={claimId} points={pointsOf(claimId)} variations={variations?.variations.filter((v) => v.claimId === claimId) ?? []} />,
    actions: <Actions draft={draft} shown={lodged.revision.number} />,
    aside: <NextStep you={you} draft={draft} desk={desk} />,
  };
}

function Actions({ draft, shown }: { readonly draft: Loaded['draft']; /** The revision before one’s eyes. */ readonly shown: number }) {
  const { id, may } = draft;
  return (
    <div className="flex flex-wrap items-start gap-2">
      {may.revise && <ActButton act={revise} input={{ id }} busy="Beginning" tone="main">Revise</ActButton>}
      {draft.revision.lodgedAt === null && <LinkButton href={`/compose/${id}`} tone="main">Go on with revision {draft.revision.number}</LinkButton>}
      <LinkButton href={`/api/v1/submissions/${id}/sheet`} external download>Claim sheet</LinkButton>
      <Duplicate id={id} title={draft.title} revision={shown} size="normal" />
      {may.withdraw && <Withdraw id={id} />}
    </div>
  );
}

/** What the authors may expect or do now, in a sentence. */
function NextStep({ you, draft, desk }: Pick<Loaded, 'you' | 'draft' | 'desk'>) {
  const open = desk.threads.filter((t) => t.state === 'open').length;
  const unconfirmed = draft.authors.some((a) => a.userId === you && !a.confirmed);
  const words: Partial<Record<Loaded['lodged']['state'], string>> = {
    lodged: 'The official run is under way. An editor sees the submission when it has ended.',
    triage: 'An editor takes it up next.',
    'in-review': 'Referees read the numbers. You are told of each question they ask.',
    deciding: 'The editor weighs the reports.',
    'back-with-author': 'The editor asks for a revision. Answer the threads, and begin the next revision where a number or a setting changes.',
    'on-hold': 'The editor has put it on hold.',
  };
  const sentence = words[desk.state];
  if (!sentence && open === 0 && !unconfirmed) return null;
  return (
    <Card title="Next step">
      <div className="grid gap-2 text-ui">
        {sentence && <p>{sentence}</p>}
        {open > 0 && <p>{open} {open === 1 ? 'thread is' : 'threads are'} open; the claims they hang on stand open above.</p>}
        {unconfirmed && <ActButton act={confirmAuthorship} input={{ id: draft.id }} busy="Confirming">Confirm my authorship</ActButton>}
      </div>
    </Card>
  );
}

export default async function Submission({ params, searchParams }: PageProps) {
  const { id } = await params;
  const { revision, ...query } = await searchParams;
  const asked = askedVariation(query);
  const wanted = revision && /^[1-9]\d{0,3}$/.test(revision) ? Number(revision) : undefined;
  const all = await loadFor(`/submissions/${id}`, (actor) => loadAll(actor, id, wanted));
  if (!all) redirect(`/compose/${id}`);
  const { lodged, desk } = all;
  const withThreads = desk.threads.filter((t) => t.state === 'open' || t.state === 'answered').map((t) => t.anchor.claim);
  return (
    <>
      <FollowRun id={id} running={isUnderWay(lodged.laterRun ?? lodged.run)} />
      <RecordPage view={submissionAsView(lodged, { reports: desk.reports.map(reportAsView), decision: decisionOf(desk.decisions, lodged.revision.number) })} slots={slotsFor(all, asked)} trail={{ href: '/submissions', label: 'Submissions' }} open={[...new Set([...withThreads, ...(asked ? [asked.claimId] : [])])]} />
      <Letters decisions={desk.decisions} />
    </>
  );
}
