import { randomUUID } from 'node:crypto';
import type { ServiceDesk } from './service-desk';

type Owner = Pick<ServiceDesk, 'sql'>;

/** A record with whatever words and numbers a test needs. The rows are the owner's; the register's own are made by its trigger. */
export interface PlantedRecord {
  readonly id: string;
  readonly title: string;
  readonly authors?: readonly string[];
  readonly statement?: string;
  readonly enteredAt?: string;
  readonly claims?: readonly PlantedClaim[];
}
export interface PlantedClaim {
  readonly quantity: string;
  readonly verdict?: string;
  /** A built-in curve, `attached`, or `none`. */
  readonly noise?: string;
  readonly points?: readonly Readonly<Record<string, unknown>>[];
}

const KEY = '0123456789abcdef';
const point = { at: {}, claimed: 0.98, printed: '0.98', value: 0.9801, expandedUncertainty: 1e-6, tolerance: 0.005, apart: 0.0001, verdict: 'agrees', routes: { A: 0.9801, B: 0.9801 } };

export async function plantRecord(desk: Owner, ownerId: string, planted: PlantedRecord): Promise<string> {
  const { id, title, authors = ['T. Marrable'], statement = '', enteredAt = '2026-11-14T09:00:00Z', claims = [{ quantity: 'match' }] } = planted;
  const named = claims.map((claim, i) => ({ verdict: 'agrees', noise: 'G2', points: [point], ...claim, id: `C${i + 1}` }));
  const sheet = {
    noise: { S: { curve: 'G2' }, T: { file: 'noise.txt', columns: ['f', 'asd'] }, L: { curve: 'SB' } },
    claims: named.map((claim) => ({ id: claim.id, quantity: claim.quantity, ...(claim.noise === 'none' ? {} : { noise: claim.noise === 'attached' ? 'T' : claim.noise === 'SB' ? 'L' : 'S' }) })),
  };
  const document = { format: 'counterfoil-record/1', id, title, authors, revision: 1, enteredAt: enteredAt.slice(0, 10), claims: named.map(({ noise: _noise, ...claim }) => ({ unit: '', covered: true, ...claim })) };
  const [submissionId, revisionId, runId, decisionId] = [randomUUID(), randomUUID(), randomUUID(), randomUUID()];
  const bare = title.replaceAll('\0', '');
  await desk.sql(`insert into signing_keys (id, public_key) values ($1, 'none') on conflict do nothing`, KEY);
  await desk.sql(`insert into submissions (id, title, state, owner_id) values ($1, $2, 'entered', $3)`, submissionId, bare, ownerId);
  await desk.sql(`insert into revisions (id, submission_id, number, title, statement, sheet, lodged_at) values ($1, $2, 1, $3, $4, $5, now())`, revisionId, submissionId, bare, statement, JSON.stringify(sheet));
  await desk.sql(`insert into runs (id, submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest) values ($1, $2, $3, 'official', '1.0.0', $4, '[]', 'none')`, runId, submissionId, revisionId, JSON.stringify(sheet));
  await desk.sql(`insert into decisions (id, submission_id, round, revision, kind, level, run_id, letter, decided_by) values ($1, $2, 1, 1, 'enter', 1, $3, '{}', $4)`, decisionId, submissionId, runId, ownerId);
  await desk.sql(
    `insert into records (id, submission_id, decision_id, revision, level, document, signature, document_digest, key_id, entered_at) values ($1, $2, $3, 1, 1, $4, ''::bytea, $5, $6, $7)`,
    id, submissionId, decisionId, Buffer.from(JSON.stringify(document), 'utf8'), randomUUID(), KEY, enteredAt,
  );
  await stand(desk, id, 'entered', enteredAt);
  return id;
}

export const stand = (desk: Owner, id: string, standing: string, since: string, reason = '') =>
  desk.sql(`insert into record_standings (record_id, standing, reason, since) values ($1, $2, $3, $4)`, id, standing, reason, since);
