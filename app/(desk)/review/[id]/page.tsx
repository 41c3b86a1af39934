import type { Metadata } from 'next';
import { askedVariation, type AskedVariation, type VariationQuery } from '@/app/(public)/variations/asked-variation';
import { variationSlot } from '@/app/(public)/variations/variation-slot';
import { RecordPage } from '@/app/_ui/claim/record-page';
import type { RecordSlots } from '@/app/_ui/claim/record-view';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { decisionOf } from '@/app/views/decision-as-view';
import { reportAsView } from '@/app/views/record-as-view';
import { submissionAsView } from '@/app/views/submission-as-view';
import { loadFor } from '@/lib/http/page-guard';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { getDesk } from '@/lib/services/reviews/get-desk';
import type { DeskView } from '@/lib/services/reviews/desk-view';
import { listRefereeCandidates } from '@/lib/services/reviews/list-referee-candidates';
import { getFigures } from '@/lib/services/runs/list-runs';
import { getReview } from '@/lib/services/submissions/get-lodged';
import type { LodgedView } from '@/lib/services/submissions/submission-view';
import { listVariations } from '@/lib/services/variations/list-variations';
import { ClaimDiscussion } from './claim-discussion';
import { candidateSlots, isLatest } from '../../candidates/candidate-slots';
import { Letters } from './letters';
import { changeAt, ThreadAnchor } from './thread-anchor';
import { DeskPanel } from './desk-panel';

export const metadata: Metadata = { title: 'Review' };

interface PageProps {
  readonly params: Promise<{ readonly id: string }>;
  readonly searchParams: Promise<VariationQuery & { readonly revision?: string }>;
}

async function loadAll(actor: Actor, id: string, revision: number | undefined) {
  const lodged = await getReview(actor, id, revision);
  const desk = await getDesk(actor, id);
  if (!lodged.ok) return lodged;
  if (!desk.ok) return desk;
  const run = lodged.value.run;
  const figures = run?.state === 'measured' ? await getFigures(actor, id, run.id) : null;
  const candidates = desk.value.may.invite ? await listRefereeCandidates(actor, id) : null;
  const variations = lodged.value.may.vary && isSignedIn(actor) ? await listVariations(actor, id, lodged.value.revision.number) : null;
  return {
    ok: true as const,
    value: {
      lodged: lodged.value,
      desk: desk.value,
      figures: figures?.ok ? figures.value.figures : {},
      candidates: candidates?.ok ? candidates.value : [],
      variations: variations?.ok ? variations.value : null,
    },
  };
}

type Loaded = Extract<Awaited<ReturnType<typeof loadAll>>, { ok: true }>['value'];

function slotsFor({ lodged, desk, candidates, variations }: Loaded, asked: AskedVariation | null): RecordSlots {
  const result = lodged.run?.state === 'measured' ? lodged.run.result : null;
  const pointsOf = (claimId: string) => result?.claims.find((c) => c.id === claimId)?.points ?? [];
  return {
    anchor: (claimId, point) => <ThreadAnchor threads={desk.threads} claimId={claimId} at={pointsOf(claimId)[point]?.at ?? {}} single={pointsOf(claimId).length === 1} />,
    change: (claimId, point) => changeAt(desk.changes, claimId, pointsOf(claimId)[point]?.at ?? {}),
    action: variationSlot({ revision: { submissionId: lodged.id, revision: lodged.revision.number, sheet: lodged.revision.sheet }, result, variations, asked }),
    ...candidateSlots({ submissionId: lodged.id, runId: lodged.run?.id ?? null, answers: lodged.candidateAnswers, mayAnswer: false, mayTakeOver: false, mayAsk: desk.may.openThread, said: (claimId) => desk.threads.filter(({ anchor }) => anchor.claim === claimId).flatMap(({ comments }) => comments.map(({ body }) => body)), varyAt: variations && isLatest(lodged) ? `/review/${lodged.id}` : null }),
    discussion: (claimId) => <ClaimDiscussion desk={desk} claimId={claimId} points={pointsOf(claimId)} variations={variations?.variations.filter((v) => v.claimId === claimId) ?? []} />,
    actions: <HeadActions desk={desk} lodged={lodged} />,
    aside: <DeskPanel desk={desk} candidates={candidates} />,
  };
}

function HeadActions({ desk, lodged }: { readonly desk: DeskView; readonly lodged: LodgedView }) {
  return (
    <div className="flex flex-wrap items-center gap-2">
      <span className="text-ui text-ink-2">You read as {desk.you.name}</span>
      {desk.may.report && <LinkButton href={`/review/${lodged.id}/report`} tone="main">Write the report</LinkButton>}
      {desk.may.decide && <LinkButton href={`/review/${lodged.id}/decide`} tone="main">Decide</LinkButton>}
      <LinkButton href={`/api/v1/submissions/${lodged.id}/sheet`} external download>Claim sheet</LinkButton>
    </div>
  );
}

export default async function Review({ params, searchParams }: PageProps) {
  const { id } = await params;
  const { revision, ...query } = await searchParams;
  const asked = askedVariation(query);
  const wanted = revision && /^[1-9]\d{0,3}$/.test(revision) ? Number(revision) : undefined;
  const all = await loadFor(`/review/${id}`, (actor) => loadAll(actor, id, wanted));
  const trail = all.desk.you.role === 'editor' ? { href: '/queue', label: 'Queue' } : { href: '/desk', label: 'Desk' };
  const withThreads = all.desk.threads.filter((t) => t.state === 'open' || t.state === 'answered').map((t) => t.anchor.claim);
  return (
    <>
      <RecordPage view={submissionAsView(all.lodged, { figures: all.figures, reports: all.desk.reports.map(reportAsView), decision: decisionOf(all.desk.decisions, all.lodged.revision.number) })} slots={slotsFor(all, asked)} trail={trail} open={[...new Set([...withThreads, ...(asked ? [asked.claimId] : [])])]} />
      <Letters decisions={all.desk.decisions} />
    </>
  );
}
