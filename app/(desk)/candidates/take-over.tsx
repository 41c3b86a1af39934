'use client';
import { ActButton } from '../act-parts';
import { takeOver } from './actions';

interface TakeOverProps {
  readonly submissionId: string;
  readonly runId: string;
  readonly claimId: string;
  readonly candidateId: string;
}

export const TakeOver = ({ submissionId, runId, claimId, candidateId }: TakeOverProps) => (
  <ActButton act={takeOver} input={{ id: submissionId, candidate: { runId, claim: claimId, candidate: candidateId } }} busy="Taking it over" tone="main" size="low">Take it over into the draft</ActButton>
);
