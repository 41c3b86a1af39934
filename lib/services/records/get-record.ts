import { database, type Reader } from '@/db/client';
import { listDecisions } from '@/db/reads/decisions/decisions';
import { findRecord, getStanding, type RecordRow } from '@/db/reads/records/record';
import { RULES_SENTENCE } from '@/lib/badges/cautions';
import type { RecordDocument } from '@/lib/badges/record';
import { isRecordId } from '@/lib/badges/record-id';
import { badgeSentence, coversLine, LEVEL_MEANINGS, wordOf } from '@/lib/badges/sentences';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Viewer } from '@/lib/reviews/anonymity';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { findOfficialResult } from '@/lib/services/reviews/official-result';
import { viewDecision } from '@/lib/services/reviews/view-decision';
import { viewReports } from '@/lib/services/reviews/view-reports';
import { viewThreads } from '@/lib/services/reviews/view-threads';
import { documentOf, signatureOf } from './record-document';
import type { RecordView } from './record-view';

/** Everybody: on the authors' side of the anonymity line, and nobody in particular. */
const PUBLIC_VIEWER: Viewer = { userId: '', side: 'authors' };

/** Records are public: what was signed, how it stands today, and what people said on the way. */
export async function getRecord(actor: Actor, id: string): Promise<Outcome<RecordView>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  const reader = database();
  const row = isRecordId(id) ? await findRecord(reader, id) : undefined;
  if (!row) return { ok: false, error: NOT_FOUND };
  const document = documentOf(row);
  const standing = await getStanding(reader, row.id);
  return ok({
    id: row.id,
    submissionId: row.submissionId,
    standing: standing.standing,
    standingSince: standing.since.toISOString(),
    standingReason: standing.reason,
    document,
    signature: signatureOf(row),
    badge: badgeWords(document),
    ...(await whatPeopleSaid(reader, row)),
    links: linksOf(row),
  });
}

const badgeWords = (document: RecordDocument): RecordView['badge'] => ({
  word: wordOf(document),
  sentence: badgeSentence(document),
  meaning: LEVEL_MEANINGS[document.decision.level],
  coversLine: coversLine(document),
  rulesSentence: RULES_SENTENCE,
});

async function whatPeopleSaid(reader: Reader, row: RecordRow): Promise<Pick<RecordView, 'decision' | 'reports' | 'threads'>> {
  const { submissionId, revision } = row;
  const decisions = await listDecisions(reader, submissionId);
  const decision = decisions.find((d) => d.id === row.decisionId);
  if (!decision) throw new Error('a record without its decision');
  const official = await findOfficialResult(reader, submissionId, revision);
  const scene = { submissionId, viewer: PUBLIC_VIEWER, revision, result: official?.result ?? null, may: { reply: false, close: false } };
  return {
    decision: viewDecision(decision, false),
    reports: await viewReports(reader, submissionId, PUBLIC_VIEWER, decisions),
    threads: await viewThreads(reader, scene),
  };
}

const linksOf = (row: RecordRow): RecordView['links'] => {
  const page = `/records/${row.id}`;
  return {
    page,
    json: `${page}/record.json`,
    signature: `${page}/signature.json`,
    bundle: `${page}/signed-record.json`,
    badge: `${page}/badge.svg`,
    key: `/keys/${row.keyId}.pem`,
  };
};
