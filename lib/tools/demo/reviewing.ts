import type { ResultPoint } from '@/lib/pipeline/result';
import type { SignedInActor } from '@/lib/policy/actor';
import type { Recommendation, ReportAnswers } from '@/lib/reviews/report';
import type { DecisionRemark, Level } from '@/lib/reviews/decision';
import { decide, type DecisionRequest } from '@/lib/services/decisions/decide';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { openThread, type ThreadRequest } from '@/lib/services/reviews/open-thread';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { takeTriage } from '@/lib/services/reviews/take-triage';
import { listVariations } from '@/lib/services/variations/list-variations';
import { requestVariation } from '@/lib/services/variations/request-variation';
import { must, type DemoRoom } from './demo-room';
import type { Place } from '@/lib/kernel/place';

/** An editor takes it, asks the referees, and they accept: in review, round 1. */
export async function beginReview(editor: SignedInActor, id: string, referees: readonly SignedInActor[]): Promise<void> {
  must(await takeTriage(editor, id));
  for (const referee of referees) {
    const { invitationId } = must(await inviteReferee(editor, id, { refereeId: referee.userId }));
    must(await answerInvitation(referee, invitationId, { accept: true, noConflict: true }));
  }
}

export const ask = async (editor: SignedInActor, id: string, person: SignedInActor): Promise<void> => void must(await inviteReferee(editor, id, { refereeId: person.userId }));

export async function startThread(actor: SignedInActor, id: string, request: Omit<ThreadRequest, 'visibility'> & Partial<Pick<ThreadRequest, 'visibility'>>): Promise<string> {
  return must(await openThread(actor, id, { visibility: 'authors', ...request })).threadId;
}

export const reply = async (actor: SignedInActor, threadId: string, body: string): Promise<void> => void must(await replyToThread(actor, threadId, { body }));

export async function report(referee: SignedInActor, id: string, recommendation: Recommendation, answers: Omit<ReportAnswers, 'candidates'>): Promise<void> {
  must(await handInReport(referee, id, { recommendation, confidence: 4, answers: { candidates: '', ...answers } }));
}

type Words = Pick<DecisionRequest, 'prose' | 'publicSentence'>;

export async function sendBack(editor: SignedInActor, id: string, prose: string): Promise<void> {
  const { signingWords } = must(await draftDecision(editor, id));
  must(await decide(editor, id, { kind: 'back-with-author', prose, typed: signingWords }));
}

export const enterAtLevelOne = (editor: SignedInActor, id: string, remarks: readonly DecisionRemark[], words: Words): Promise<void> => enter(editor, id, 1, remarks, words);

export async function enter(editor: SignedInActor, id: string, level: Level, remarks: readonly DecisionRemark[], words: Words): Promise<void> {
  const { signingWords } = must(await draftDecision(editor, id));
  must(await decide(editor, id, { kind: 'enter', level, remarks, ...words, typed: signingWords }));
}

/** A referee reruns one claim with another setting, and asks about it where the number stands. */
export async function askWithRerun(room: DemoRoom, referee: SignedInActor, id: string, rerun: Rerun): Promise<string> {
  const { claim, at, settings, note, body } = rerun;
  const { variationId, runId } = must(await requestVariation(referee, id, { claimId: claim, changes: { settings }, note }));
  await room.compute(runId);
  const found = (await pointsOf(referee, id, variationId)).map(spoken).join(', ');
  return startThread(referee, id, { kind: 'must-change', anchor: { claim, at }, body: `${body} It gives ${found}.`, variationId });
}

interface Rerun {
  readonly claim: string;
  readonly at: Place | null;
  readonly settings: Readonly<Record<string, unknown>>;
  readonly note: string;
  readonly body: string;
}

async function pointsOf(actor: SignedInActor, id: string, variationId: string): Promise<readonly ResultPoint[]> {
  const { variations } = must(await listVariations(actor, id));
  const run = variations.find((v) => v.id === variationId)?.run;
  if (run?.state !== 'measured') throw new Error(`the rerun of ${id} is ${run?.state ?? 'not there'}`);
  return run.result.claims[0]?.points ?? [];
}

function spoken({ value, at }: ResultPoint): string {
  const number = value === null ? 'no number' : String(Number(value.toPrecision(4)));
  const mass = at['totalMassMsun'];
  return mass === undefined ? number : `${number} at ${mass} solar masses`;
}
