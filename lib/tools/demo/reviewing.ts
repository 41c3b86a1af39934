import type { SignedInActor } from '@/lib/policy/actor';
import type { Recommendation, ReportAnswers } from '@/lib/reviews/report';
import type { DecisionRemark } from '@/lib/reviews/decision';
import { decide, type DecisionRequest } from '@/lib/services/decisions/decide';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { openThread, type ThreadRequest } from '@/lib/services/reviews/open-thread';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { takeTriage } from '@/lib/services/reviews/take-triage';
import { must } from './demo-room';

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

export async function enterAtLevelOne(editor: SignedInActor, id: string, remarks: readonly DecisionRemark[], words: Words): Promise<void> {
  const { signingWords } = must(await draftDecision(editor, id));
  must(await decide(editor, id, { kind: 'enter', level: 1, remarks, ...words, typed: signingWords }));
}
