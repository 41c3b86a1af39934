import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { loadFor } from '@/lib/http/page-guard';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { ReportForm } from './report-form';

export const metadata: Metadata = { title: 'Report' };

export default async function Report({ params }: { readonly params: Promise<{ readonly id: string }> }) {
  const { id } = await params;
  const desk = await loadFor(`/review/${id}/report`, (actor) => getDesk(actor, id));
  return (
    <div className="wrap pt-10">
      <div className="mx-auto grid max-w-[820px] gap-6">
        <p className="flex flex-wrap items-center gap-x-3 text-ui text-ink-2">{desk.you.name} · {desk.stateWords}, revision {desk.revision} <Link className="inline-flex min-h-8 items-center" href={`/review/${id}` as Route}>Read the claims and threads</Link></p>
        <h1>Report on “{desk.title}”</h1>
        {desk.may.report ? (
          <ReportForm submissionId={id} />
        ) : (
          <Notice kind="note" actions={<LinkButton href={`/review/${id}`}>Back to the desk</LinkButton>}>
            {desk.report?.handedIn ? 'Your report for this round is in. It is released to the authors together with the others, at the decision.' : 'No report is asked of you now.'}
          </Notice>
        )}
      </div>
    </div>
  );
}
