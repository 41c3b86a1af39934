import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { ClaimTable, ClaimTableLegend } from '@/app/_ui/claim/claim-table';
import { submissionAsView } from '@/app/views/submission-as-view';
import { loadFor, loadMember } from '@/lib/http/page-guard';
import { listOpenUploads } from '@/lib/services/files/finish-upload';
import { getDraft } from '@/lib/services/submissions/get-draft';
import type { DraftView } from '@/lib/services/submissions/submission-view';
import { catalogueRows } from './catalogue-rows';
import { checkSummary } from './check-summary';
import { Composer } from './composer';

export const metadata: Metadata = { title: 'Composer' };

interface PageProps {
  readonly params: Promise<{ readonly id: string }>;
}

/** Claimed beside recomputed, as referees will see it. */
function Reading({ draft }: { readonly draft: DraftView }) {
  const view = submissionAsView(draft);
  if (view.claims.length === 0) return null;
  return (
    <section aria-labelledby="reading-h" className="mt-12">
      <h2 id="reading-h" className="mb-1">What the check reads</h2>
      <p className="mb-3 text-ui text-ink-2">{draft.check ? (draft.check.current ? 'Of what is saved now; seen by the authors alone.' : 'Of an earlier save; check again for what is saved now.') : 'Nothing has been computed yet.'}</p>
      <ClaimTable view={view} />
      <ClaimTableLegend />
    </section>
  );
}

export default async function Compose({ params }: PageProps) {
  const { id } = await params;
  const draft = await loadFor(`/compose/${id}`, (actor) => getDraft(actor, id));
  if (draft.revision.lodgedAt !== null) redirect(`/submissions/${id}`);
  const you = await loadMember(`/compose/${id}`);
  const uploads = await loadFor(`/compose/${id}`, (actor) => listOpenUploads(actor, id));
  const { revision } = draft;
  return (
    <Composer key={revision.id} id={id} revision={revision.number} version={revision.version} sheet={revision.sheet} files={revision.files} uploads={uploads} authors={draft.authors} you={you.userId} stateWords={draft.stateWords} catalogue={catalogueRows()} check={checkSummary(draft.check, revision.answers)} beforeLodging={draft.beforeLodging}>
      <Reading draft={draft} />
    </Composer>
  );
}
