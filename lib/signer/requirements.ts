import type { SigningFacts } from '@/db/reads/records/signing-facts';
import { digestOf } from '@/lib/badges/canonical-json';
import { allFinite } from '@/lib/kernel/finite';
import type { ResultClaim, ResultDocument, ResultPoint } from '@/lib/pipeline/result';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';
import { asDraftSheet } from '@/lib/services/submissions/draft-sheet';

/** Why a decision is not signed: told to the editor, who decides anew. */
export interface SigningRefusal {
  readonly code: string;
  readonly reason: string;
}

const refuse = (code: string, reason: string): SigningRefusal => ({ code: `signer/${code}`, reason });

const REPORTS_WANTED: Readonly<Record<number, number>> = { 1: 1, 2: 2, 3: 2 };

/**
 * What has to hold before a signature, asked again here from the tables alone. It repeats the rules
 * of the review on purpose: a signature must not rest on the process that serves the web.
 */
export function findRefusal(facts: SigningFacts): SigningRefusal | null {
  return decisionRefusal(facts) ?? runRefusal(facts) ?? claimsRefusal(facts);
}

function decisionRefusal({ decision, state, revision, reports }: SigningFacts): SigningRefusal | null {
  if (decision.kind !== 'enter' || decision.level === null) return refuse('not-entered', 'The decision does not enter the submission.');
  if (state !== 'deciding') return refuse('state', `The submission is in the state ${state}; a record is signed in deciding.`);
  if (revision.lodgedAt === null) return refuse('not-lodged', `Revision ${revision.number} is not lodged.`);
  const wanted = REPORTS_WANTED[decision.level] ?? Infinity;
  if (reports < wanted) return refuse('reports', `Level ${decision.level} asks for ${wanted} ${wanted === 1 ? 'report' : 'reports'}; ${reports} handed in.`);
  if (decision.level === 3) return refuse('scope', 'No scan of the declared domain has been run, which level 3 rests on.');
  return null;
}

function runRefusal({ run, revision, result, resultDigest, resultEngine, files }: SigningFacts): SigningRefusal | null {
  if (run.kind !== 'official' || run.revisionId !== revision.id) return refuse('run', 'The decision rests on a run that is not the official one of its revision.');
  if (result === null || resultDigest === null) return refuse('no-result', 'The official run has no result.');
  const digest = digestOf(result);
  if (digest !== resultDigest) return refuse('result-changed', `The stored result has the digest ${digest}; the run recorded ${resultDigest}.`);
  if (result.engine !== run.engine || resultEngine !== run.engine) return refuse('engine', `The result names engine ${result.engine}; the run was asked of ${run.engine}.`);
  const lodged = inputsDigest(asDraftSheet(revision.sheet, revision) as unknown as Record<string, unknown>, files);
  if (lodged !== run.inputsDigest) return refuse('inputs', 'Sheet and files of the lodged revision are not those that were computed.');
  if (inputsDigest(run.sheet as Record<string, unknown>, run.inputs) !== run.inputsDigest) return refuse('inputs', 'The run does not carry the inputs its digest names.');
  return filesRefusal(result, files);
}

function filesRefusal(result: ResultDocument, files: SigningFacts['files']): SigningRefusal | null {
  for (const used of result.files) {
    const stored = files.find((f) => f.name === used.name);
    if (!stored) return refuse('files', `The result was computed from ${used.name}, which the revision does not have.`);
    if (stored.sha256 !== used.sha256) return refuse('files', `The result was computed from ${used.name} with SHA-256 ${used.sha256}; the revision has ${stored.sha256}.`);
  }
  return null;
}

/** Two routes that agree, at every point where both ran, within max(T/4, U). */
function routesAgree(point: ResultPoint): boolean {
  const { A, B } = point.routes;
  if (!allFinite(A, B, point.value, point.expandedUncertainty)) return false;
  return Math.abs(Number(A) - Number(B)) <= Math.max((point.tolerance ?? 0) / 4, Number(point.expandedUncertainty));
}

function claimRefusal(claim: ResultClaim, level: number): SigningRefusal | null {
  if (claim.verdict !== 'agrees' || claim.points.length === 0 || claim.points.some((p) => p.verdict !== 'agrees'))
    return refuse('verdict', `The level covers ${claim.id}, whose verdict is ${claim.verdict.replace('-', ' ')}.`);
  const both = claim.routeB.map((i) => claim.points[i]);
  if (both.length === 0 || both.some((p) => p === undefined || !routesAgree(p))) return refuse('routes', `The level covers ${claim.id}, on which the two routes do not agree.`);
  if (level > 1 && claim.coverage.state !== 'covered') return refuse('coverage', `Level ${level} covers ${claim.id}, whose stated uncertainty is ${claim.coverage.state}.`);
  return null;
}

function claimsRefusal({ decision, result }: SigningFacts): SigningRefusal | null {
  if (decision.covers.length === 0) return refuse('covers-nothing', 'The level covers no claim.');
  for (const id of decision.covers) {
    const claim = result?.claims.find((c) => c.id === id);
    if (!claim) return refuse('no-such-claim', `The level covers ${id}, which the result does not have.`);
    const refusal = claimRefusal(claim, decision.level ?? 3);
    if (refusal) return refusal;
  }
  return null;
}
