import { database } from '@/db/client';
import { findRecord, getStanding } from '@/db/reads/records/record';
import { findRun } from '@/db/reads/runs/run';
import { setStanding } from '@/db/writes/records/set-standing';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { compareResults, staysValid, type MovedNumber } from '@/lib/reviews/recheck';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { documentOf } from './record-document';

export interface Rechecked {
  readonly stays: boolean;
  readonly numbers: readonly MovedNumber[];
  readonly sentence: string;
}

/** Puts the numbers of a newer engine beside the signed ones: the record stays valid, or stands under recheck with both told. */
export async function concludeRecheck(actor: Actor, recordId: string, runId: string): Promise<Outcome<Rechecked>> {
  const record = await findRecord(database(), recordId);
  if (!record) return { ok: false, error: NOT_FOUND };
  return actOnSubmission({ actor, action: 'record.recheck', submissionId: record.submissionId }, async ({ tx, grant, facts, note }) => {
    const { standing } = await getStanding(tx, recordId);
    if (standing !== 'entered' && standing !== 'under-recheck') return fail('conflict', `This record stands as ${standing}; only one that is entered or under recheck is measured again.`);
    const run = await findRun(tx, runId);
    if (run?.submissionId !== record.submissionId || run.kind !== 'official') return { ok: false, error: NOT_FOUND };
    if (!run.result) return fail('precondition', 'The run has no result yet. Conclude when it is measured.');
    const document = documentOf(record);
    const numbers = compareResults(document.claims, run.result.claims);
    const stays = staysValid(numbers);
    const sentence = sentenceOf(numbers, stays, document.engine, run.engine);
    const to = stays ? 'entered' : 'under-recheck';
    await setStanding(tx, grant, { recordId, standing: to, reason: sentence });
    if (facts.state !== to && !(await moveSubmission(tx, grant, { to }))) return fail('conflict', 'The record has moved on meanwhile. Reload to see where it stands.');
    note({ recordId, runId, before: document.engine, now: run.engine, stays, moved: numbers.filter(({ move }) => move !== 'same') });
    return ok({ stays, numbers, sentence });
  });
}

function sentenceOf(numbers: readonly MovedNumber[], stays: boolean, before: string, now: string): string {
  const engines = `Measured again with engine ${now}, after ${before}.`;
  if (stays) return `${engines} Still valid: no number moved by more than its own uncertainty, and no verdict changed.`;
  const told = numbers.filter(({ move }) => move === 'beyond U').map((n) => `${n.claimId}${placeOf(n)}: ${digitsOf(n.before)} → ${digitsOf(n.now)} (U was ${digitsOf(n.expandedUncertainty, 2)})`);
  return `${engines} Moved by more than its own uncertainty: ${told.join('; ')}.`;
}

const placeOf = ({ at }: MovedNumber): string => {
  const place = Object.entries(at).map(([name, value]) => `${name} ${value}`);
  return place.length === 0 ? '' : ` at ${place.join(', ')}`;
};
const digitsOf = (x: number | null, digits = 7): string => (x === null ? 'none' : String(Number(x.toPrecision(digits))).replace('-', '−'));
