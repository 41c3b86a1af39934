import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { askedVariation, type AskedVariation, type VariationQuery } from '@/app/(public)/variations/asked-variation';
import { variationSlot } from '@/app/(public)/variations/variation-slot';
import { ClaimTable, ClaimTableLegend } from '@/app/_ui/claim/claim-table';
import { Notice } from '@/app/_ui/primitives/notice';
import { submissionAsView } from '@/app/views/submission-as-view';
import { loadFor, loadMember } from '@/lib/http/page-guard';
import { listOpenUploads } from '@/lib/services/files/finish-upload';
import { getDraft } from '@/lib/services/submissions/get-draft';
import type { DraftView } from '@/lib/services/submissions/submission-view';
import { listVariations } from '@/lib/services/variations/list-variations';
import type { VariationList } from '@/lib/services/variations/variation-view';
import { isUnderWay } from '@/lib/services/runs/under-way';
import { catalogueRows } from './catalogue-rows';
import { checkSummary } from './check-summary';
import { candidateSlots } from '../../candidates/candidate-slots';
import { Composer } from './composer';

export const metadata: Metadata = { title: 'Composer' };

interface PageProps {
  readonly params: Promise<{ readonly id: string }>;
  readonly searchParams: Promise<VariationQuery>;
}

/** Claimed beside recomputed, as referees will see it. */
function Reading({ draft, variations, asked }: { readonly draft: DraftView; readonly variations: VariationList | null; readonly asked: AskedVariation | null }) {
  const view = submissionAsView(draft);
  if (view.claims.length === 0) return null;
  // With another sheet meanwhile, the number beside would be another's.
  const shown = draft.check?.before ?? draft.check;
  const current = shown?.current && shown.run.state === 'measured' ? shown.run.result : null;
  const action = variationSlot({ revision: { submissionId: draft.id, revision: draft.revision.number, isDraft: true, sheet: draft.revision.sheet }, result: current, variations, asked });
  return (
    <section aria-labelledby="reading-h" className="mt-12">
      <h2 id="reading-h" className="mb-1">What the check reads</h2>
      <p className="mb-3 text-ui text-ink-2">{shown ? (shown.current ? 'Of what is saved now; seen by the authors alone.' : 'Of an earlier save; check again for what is saved now.') : 'Nothing has been computed yet.'}</p>
      {view.laterRun && <div className="mb-3"><Notice kind="look" word="A check before"><p>{view.laterRun} {isUnderWay(draft.check?.run) ? '' : <a href="#check" className="inline-flex min-h-8 items-center">Check again</a>}</p></Notice></div>}
      <ClaimTable view={view} slots={{ action, ...candidateSlots({ submissionId: draft.id, runId: shown?.run.id ?? null, answers: draft.candidateAnswers, mayAnswer: draft.may.answerCandidates, mayTakeOver: draft.may.edit, mayAsk: false, varyAt: variations ? `/compose/${draft.id}` : null }) }} open={asked ? [asked.claimId] : []} />
      <ClaimTableLegend />
    </section>
  );
}

export default async function Compose({ params, searchParams }: PageProps) {
  const { id } = await params;
  const draft = await loadFor(`/compose/${id}`, (actor) => getDraft(actor, id));
  if (draft.revision.lodgedAt !== null) redirect(`/submissions/${id}`);
  const you = await loadMember(`/compose/${id}`);
  const uploads = await loadFor(`/compose/${id}`, (actor) => listOpenUploads(actor, id));
  const variations = draft.may.vary ? await loadFor(`/compose/${id}`, (actor) => listVariations(actor, id, draft.revision.number)) : null;
  const { revision } = draft;
  return (
    <Composer key={revision.id} id={id} revision={revision.number} version={revision.version} sheet={revision.sheet} files={revision.files} uploads={uploads} authors={draft.authors} you={you.userId} stateWords={draft.stateWords} catalogue={catalogueRows()} check={checkSummary(draft.check, revision.answers)} beforeLodging={draft.beforeLodging} answers={revision.answers}>
      <Reading draft={draft} variations={variations} asked={askedVariation(await searchParams)} />
    </Composer>
  );
}
