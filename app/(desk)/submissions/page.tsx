import type { Metadata } from 'next';
import Link from 'next/link';
import type { Route } from 'next';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { Table } from '@/app/_ui/primitives/table';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import { formatDay } from '@/app/views/dates';
import { loadFor } from '@/lib/http/page-guard';
import { listOwnSubmissions } from '@/lib/services/submissions/list-own-submissions';
import type { SubmissionLine } from '@/lib/services/submissions/submission-view';
import { Duplicate } from './duplicate';
import { NewSubmission } from './new-submission';

export const metadata: Metadata = { title: 'Submissions' };

/** The composer while it is written; once lodged, the page that shows it as its readers see it. */
const addressOf = (line: SubmissionLine): string => (line.state === 'draft' || (line.state === 'checking' && line.revision === 1) ? `/compose/${line.id}` : `/submissions/${line.id}`);

function Row({ line }: { readonly line: SubmissionLine }) {
  return (
    <tr>
      <th scope="row"><Link href={addressOf(line) as Route}>{line.title || 'Untitled'}</Link><span className="block text-small font-normal text-ink-2">revision {line.revision}, you are {line.role}</span></th>
      <td>{line.verdicts.length > 0 ? <VerdictStrip verdicts={line.verdicts.map(({ claim, verdict }) => ({ id: claim, verdict }))} /> : <span className="text-ink-2">not run yet</span>}</td>
      <td>{line.stateWords}</td>
      <td>{formatDay(line.updatedAt)}</td>
      <td className="text-right"><Duplicate id={line.id} title={line.title} /></td>
    </tr>
  );
}

export default async function Submissions() {
  const lines = await loadFor('/submissions', listOwnSubmissions);
  return (
    <div className="wrap grid gap-8 pt-10 pb-16">
      <div>
        <h1>Your submissions</h1>
        <p className="mt-1 text-ink-2">What you wrote, alone or with others, the latest change first.</p>
      </div>
      <NewSubmission />
      {lines.length === 0 ? (
        <EmptyState title="Nothing here yet">A submission holds waveforms, noise curves and the numbers you claim of them. The server recomputes each number from your files.</EmptyState>
      ) : (
        <Table caption="Your submissions">
          <thead><tr><th scope="col">Submission</th><th scope="col">Verdicts</th><th scope="col">State</th><th scope="col">Changed</th><th scope="col"><span className="sr-only">Next step</span></th></tr></thead>
          <tbody>{lines.map((line) => <Row key={line.id} line={line} />)}</tbody>
        </Table>
      )}
    </div>
  );
}
