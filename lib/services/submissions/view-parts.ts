import type { Reader } from '@/db/client';
import { getSubmissionHead, listAuthors } from '@/db/reads/submissions/submission-head';
import { listCandidateAnswers } from '@/db/reads/candidates/candidate-answers';
import { listFindingAnswers } from '@/db/reads/submissions/finding-answers';
import { listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { utcDay } from '@/lib/reviews/anonymity';
import { formatState } from '@/lib/reviews/states';
import { sideOf } from '@/lib/services/reviews/side';
import type { CandidateAnswerView } from '@/lib/services/candidates/candidate-answers';
import { asDraftSheet } from './draft-sheet';
import type { AuthorView, DraftView, RevisionView } from './submission-view';
import { whatIsAllowed } from './what-is-allowed';

type Head = Omit<DraftView, 'kind' | 'revision' | 'check' | 'beforeLodging' | 'candidateAnswers'>;

export async function viewHead(reader: Reader, actor: Actor, facts: SubmissionFacts): Promise<Head & { readonly currentRevision: number }> {
  const head = await getSubmissionHead(reader, facts.submissionId);
  const authors = await listAuthors(reader, facts.submissionId);
  return {
    id: head.id,
    title: head.title,
    state: head.state,
    stateWords: formatState(head.state, head.round),
    round: head.round,
    currentRevision: head.currentRevision,
    stateChangedAt: sideOf(actor, facts) === 'editor' ? head.stateChangedAt.toISOString() : dayOnly(head.stateChangedAt),
    authors: authors.map((a): AuthorView => ({ ...(facts.authorship && { userId: a.userId }), name: a.name, affiliation: a.affiliation, orcid: orcidOf(a), role: a.role, confirmed: a.confirmedAt !== null })),
    may: whatIsAllowed(actor, facts),
  };
}

/** What ORCID said goes before what somebody typed. */
const orcidOf = ({ orcid, typedOrcid }: { readonly orcid: string | null; readonly typedOrcid: string | null }): AuthorView['orcid'] =>
  orcid ? { id: orcid, authenticated: true } : typedOrcid ? { id: typedOrcid, authenticated: false } : null;

/** An acceptance or a report moves a submission: the hour would tell who acted. */
export const dayOnly = (moment: Date): string => `${utcDay(moment.toISOString())}T00:00:00.000Z`;

export async function viewRevision(reader: Reader, row: RevisionRow): Promise<RevisionView> {
  const files = await listRevisionFiles(reader, row.id);
  return {
    id: row.id,
    number: row.number,
    title: row.title,
    statement: row.statement,
    sheet: asDraftSheet(row.sheet, row),
    files: files.map(({ id, name, bytes, sha256 }) => ({ id, name, bytes, sha256 })),
    answers: await listFindingAnswers(reader, row.id),
    lodgedAt: row.lodgedAt?.toISOString() ?? null,
    version: row.version,
  };
}

/** What the authors said to candidates, by day: the hour would say more than anybody needs. */
export async function viewCandidateAnswers(reader: Reader, submissionId: string): Promise<CandidateAnswerView[]> {
  const rows = await listCandidateAnswers(reader, submissionId);
  return rows.map(({ claimId, candidateId, answeredAt, ...row }) => ({ ...row, claim: claimId, candidate: candidateId, answeredAt: dayOnly(answeredAt) }));
}
