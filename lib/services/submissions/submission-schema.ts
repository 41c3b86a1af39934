import { z } from 'zod';
import { SUBMISSION_STATES } from '@/lib/policy/submission-state';
import { candidateAnswerSchema } from '@/lib/services/candidates/candidate-answers';
import { checkSchema, runSchema } from '@/lib/services/runs/run-schema';
import type { UploadView } from '@/lib/services/files/upload-view';
import type { Allowed, DraftView, FileView, LodgedView, RevisionView, SubmissionLine } from './submission-view';

/** The views of `submission-view.ts` as schemas: what the interface promises, and what a test holds its answers to. */
const verdict = z.enum(['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree']);
const part = z.record(z.string(), z.unknown());

export const fileSchema = z.object({ id: z.string(), name: z.string(), bytes: z.int(), sha256: z.string() }).meta({ id: 'File' }) satisfies z.ZodType<FileView>;

const sheet = z
  .looseObject({ format: z.literal('counterfoil-claim/1'), title: z.string(), statement: z.string(), waveforms: z.record(z.string(), part), noise: z.record(z.string(), part), claims: z.array(part) })
  .meta({ id: 'Sheet', description: 'The claim sheet as the author wrote it, complete or not; its own schema is at /schemas/counterfoil-claim/1.' });

const answer = z.object({ code: z.string(), where: z.string(), text: z.string(), answer: z.string() });
const author = z.object({ userId: z.string().optional(), name: z.string(), affiliation: z.string().nullable(), orcid: z.object({ id: z.string(), authenticated: z.boolean() }).nullable().optional(), role: z.enum(['author', 'co-author']), confirmed: z.boolean() });
const allowed = z
  .object({ edit: z.boolean(), check: z.boolean(), lodge: z.boolean(), withdraw: z.boolean(), revise: z.boolean(), vary: z.boolean(), answerCandidates: z.boolean(), comment: z.boolean(), report: z.boolean(), invite: z.boolean(), decide: z.boolean() })
  .meta({ id: 'Allowed', description: 'What the caller may do now.' }) satisfies z.ZodType<Allowed>;

const revision = z
  .object({
    id: z.string(),
    number: z.int(),
    title: z.string(),
    statement: z.string(),
    sheet,
    files: z.array(fileSchema),
    answers: z.array(answer).describe('The authors’ answers to findings of its checks.'),
    lodgedAt: z.string().nullable(),
    version: z.int().describe('Counts saves of a draft.'),
  })
  .meta({ id: 'Revision' });

const head = {
  id: z.string(),
  title: z.string(),
  state: z.enum(SUBMISSION_STATES),
  stateWords: z.string(),
  round: z.int(),
  authors: z.array(author),
  stateChangedAt: z.string(),
  may: allowed,
  candidateAnswers: z.array(candidateAnswerSchema).describe('The authors’ word on candidates, the earliest first; empty in public.'),
  revision,
};

export const draftSchema = z
  .object({ kind: z.literal('draft'), ...head, check: checkSchema.nullable(), beforeLodging: z.array(z.string()).describe('What stands in the way of lodging; empty when it is open.') })
  .meta({ id: 'Draft' });
export const lodgedSchema = z
  .object({ kind: z.enum(['review', 'public']), ...head, revisions: z.array(z.object({ number: z.int(), lodgedAt: z.string() })), run: runSchema.nullable(), laterRun: runSchema.nullable().describe('A later official run, of another engine, that has no numbers; those of `run` stand.') })
  .meta({ id: 'Lodged' });
export const submissionSchema = z.union([draftSchema, lodgedSchema]).meta({ id: 'Submission' });

export const uploadSchema = z
  .object({ id: z.string(), name: z.string(), bytes: z.int(), sha256: z.string(), partBytes: z.int(), arrived: z.array(z.int()).describe('Of all parts from 0 on, those that have arrived.') })
  .meta({ id: 'Upload', description: 'A long file on its way.' }) satisfies z.ZodType<UploadView>;

export const submissionLineSchema = z
  .object({
    id: z.string(),
    title: z.string(),
    state: z.enum(SUBMISSION_STATES),
    stateWords: z.string(),
    round: z.int(),
    revision: z.int(),
    role: z.enum(['author', 'co-author']),
    verdicts: z.array(z.object({ claim: z.string(), verdict })),
    updatedAt: z.string(),
  })
  .meta({ id: 'SubmissionLine' }) satisfies z.ZodType<SubmissionLine>;

/** Read by the compiler alone: a field added to a view and not to its schema is an error here. */
export type SchemaCovers = [keyof DraftView extends keyof z.infer<typeof draftSchema> ? true : never, keyof LodgedView extends keyof z.infer<typeof lodgedSchema> ? true : never, keyof RevisionView extends keyof z.infer<typeof revision> ? true : never];
