import { z } from 'zod';
import { pageQuery, pageSchema } from '@/lib/services/paging';
import { candidateAnswerInput, namedCandidate } from '@/lib/services/candidates/answer-candidate';
import { figuresSchema, runSchema } from '@/lib/services/runs/run-schema';
import { announcedFile } from '@/lib/services/files/upload-view';
import { structureSchema } from '@/lib/services/files/structure-schema';
import { findingAnswer } from '@/lib/services/submissions/answer-finding';
import { fileSchema, submissionLineSchema, submissionSchema, uploadSchema } from '@/lib/services/submissions/submission-schema';
import { draftPatch } from '@/lib/services/submissions/update-draft';
import { variationInput } from '@/lib/services/variations/request-variation';
import { linkInput } from '@/lib/services/variations/open-by-link';
import { offeredReadingSchema, variationPageSchema, variationSchema } from '@/lib/services/variations/variation-schema';
import { VARIATION_VISIBILITIES } from '@/lib/services/variations/variation-view';
import { operation } from '../operation';

/**
 * The contract of the interface, noun by noun: each door with what it takes and gives. A route adds the
 * verb; the OpenAPI document, the page about the interface and the tests read the same lines.
 */
const uuid = z.uuid({ version: 'v4' });
export const idParam = z.strictObject({ id: uuid });
const page = z.strictObject(pageQuery);
const nothing = z.null();

export const listSubmissions = operation({ door: 'GET /api/v1/submissions', summary: 'Your submissions, the newest first.', query: page, answer: pageSchema(submissionLineSchema) });
export const createSubmission = operation({
  door: 'POST /api/v1/submissions',
  summary: 'A claim sheet with its files, or the same as one .zip, becomes a draft.',
  body: 'stream',
  rate: { points: 60, perS: 3600 },
  status: 201,
  answer: z.object({ id: uuid }),
});
export const readSubmission = operation({ door: 'GET /api/v1/submissions/{id}', summary: 'State, sheet, files and verdicts: the draft for its authors, else the latest lodged revision.', params: idParam, answer: submissionSchema });
export const editSubmission = operation({
  door: 'PATCH /api/v1/submissions/{id}',
  summary: 'Changes title, statement or parts of the sheet of a draft; names the version it was made on, by If-Match or in the body.',
  params: idParam,
  body: draftPatch,
  ifMatch: true,
  answer: z.object({ version: z.int() }),
});
export const readSheet = operation({ door: 'GET /api/v1/submissions/{id}/sheet', summary: 'The claim sheet as claim.json.', params: idParam, media: 'application/json' });
export const addFiles = operation({ door: 'POST /api/v1/submissions/{id}/files', summary: 'Adds files to a draft, all or none; one of the same name is replaced.', params: idParam, body: 'stream', status: 201, answer: z.array(fileSchema) });
export const removeFile = operation({ door: 'DELETE /api/v1/submissions/{id}/files', summary: 'Takes a file out of a draft.', params: idParam, body: z.strictObject({ name: z.string().min(1).max(300) }), ifMatch: true, answer: nothing });
const uploadParam = z.strictObject({ id: uuid, uploadId: uuid });
export const beginUpload = operation({ door: 'POST /api/v1/submissions/{id}/uploads', summary: 'Announces a long file, to be sent part by part; one that was begun goes on.', params: idParam, body: announcedFile, answer: z.union([z.object({ file: fileSchema, upload: z.null() }), z.object({ file: z.null(), upload: uploadSchema })]).describe('The file when its bytes are here already, else what is still wanted.') });
export const sendPart = operation({
  door: 'PUT /api/v1/submissions/{id}/uploads/{uploadId}/parts/{number}',
  summary: 'The bytes of one part; the same part again takes the place of the first.',
  params: z.strictObject({ id: uuid, uploadId: uuid, number: z.coerce.number().int().min(0).max(999) }),
  body: 'bytes',
  rate: { points: 600, perS: 60 },
  answer: z.object({ number: z.int() }),
});
export const finishUpload = operation({ door: 'POST /api/v1/submissions/{id}/uploads/{uploadId}', summary: 'All parts are there: the file takes its place in the draft.', params: uploadParam, status: 201, answer: fileSchema });
export const letGoOfUpload = operation({ door: 'DELETE /api/v1/submissions/{id}/uploads/{uploadId}', summary: 'Lets go of an upload that was begun.', params: uploadParam, answer: nothing });
export const answerFinding = operation({ door: 'PUT /api/v1/submissions/{id}/answers', summary: 'The authors’ word on a finding of the latest check, or on a guess of a result under `guess/` and what it is about, the place being its field and the text what was proposed; an empty one takes it back.', params: idParam, body: findingAnswer, answer: nothing });
export const answerCandidate = operation({ door: 'PUT /api/v1/submissions/{id}/candidates', summary: 'The authors’ word on a candidate of a run: confirmed, not so, or cannot tell. It changes no number.', params: idParam, body: candidateAnswerInput, answer: nothing });
export const takeOverCandidate = operation({ door: 'POST /api/v1/submissions/{id}/candidates', summary: 'Declares the settings of a confirmed candidate in the revision that is being written.', params: idParam, body: namedCandidate, answer: z.object({ version: z.int(), claims: z.array(z.string()) }) });
export const readFile = operation({ door: 'GET /api/v1/submissions/{id}/files/{fileId}', summary: 'An uploaded file, as an attachment. A referee gets text before it is public with those comments blanked that say whose it is, and a header counterfoil-copy with the digest of the original.', params: z.strictObject({ id: uuid, fileId: uuid }), media: 'application/octet-stream' });
export const readFileStructure = operation({ door: 'GET /api/v1/submissions/{id}/files/{fileId}/structure', summary: 'What an uploaded .h5, .npz or .npy holds: its datasets with shape, type and attributes, none of their numbers.', params: z.strictObject({ id: uuid, fileId: uuid }), rate: { points: 60, perS: 60 }, answer: structureSchema });
export const checkSubmission = operation({ door: 'POST /api/v1/submissions/{id}/check', summary: 'Asks for the server’s reading of a draft before it is lodged.', params: idParam, status: 202, answer: z.object({ runId: uuid }) });
export const lodgeSubmission = operation({ door: 'POST /api/v1/submissions/{id}/lodge', summary: 'Freezes the revision and asks for its official run.', params: idParam, status: 202, ifMatch: true, answer: z.object({ revision: z.int(), runId: uuid }) });
export const withdrawSubmission = operation({ door: 'POST /api/v1/submissions/{id}/withdraw', summary: 'Takes a submission back before a decision; nothing is erased.', params: idParam, body: z.strictObject({ reason: z.string().max(2000) }), answer: nothing });
export const reviseSubmission = operation({ door: 'POST /api/v1/submissions/{id}/revise', summary: 'Begins the next revision as a copy of the last.', params: idParam, status: 201, answer: z.object({ revision: z.int() }) });

export const listRuns = operation({ door: 'GET /api/v1/submissions/{id}/runs', summary: 'Runs that you may see, with their results, the newest first.', params: idParam, query: page, answer: pageSchema(runSchema) });
export const readFigures = operation({ door: 'GET /api/v1/submissions/{id}/figures', summary: 'The curves of one run.', params: idParam, query: z.strictObject({ run: z.string().describe('Id of the run.') }), answer: figuresSchema });
export const watchRuns = operation({ door: 'GET /api/v1/submissions/{id}/events', summary: 'Live progress, as server-sent events named progress, until one named end; 204 when nothing runs.', params: idParam, media: 'text/event-stream' });

export const stopRun = operation({ door: 'POST /api/v1/submissions/{id}/runs/{runId}/stop', summary: 'Your own check or variation is wanted no longer: before there is a number nothing is kept of it; a search for other readings ends with what it has. An official run is not stopped.', params: z.strictObject({ id: uuid, runId: uuid }), status: 202, answer: nothing });

export const listVariations = operation({ door: 'GET /api/v1/submissions/{id}/variations', summary: 'Your reruns with other settings, how many more you may ask for now, and for a claim that is named how it may be read otherwise.', params: idParam, query: page.extend({ claimId: z.string().max(64).optional().describe('Also gives the readings of this claim, of the newest lodged revision, else of your draft.') }), answer: pageSchema(variationSchema).extend({ left: z.int(), readings: z.array(offeredReadingSchema) }) });
export const askVariation = operation({ door: 'POST /api/v1/submissions/{id}/variations', summary: 'Asks for a rerun of one claim with other settings, other readings of its inputs or a mask, of a lodged revision or of your own draft; it changes no official number.', params: idParam, body: variationInput, status: 202, answer: z.object({ variationId: uuid, runId: uuid }) });

const variationParam = z.strictObject({ id: uuid, variationId: uuid });
export const readVariation = operation({ door: 'GET /api/v1/submissions/{id}/variations/{variationId}', summary: 'One variation beside the number it varies: your own, one attached to a comment that you may read, or one that its owner opened by its link.', params: variationParam, answer: variationPageSchema });
export const openVariation = operation({ door: 'PUT /api/v1/submissions/{id}/variations/{variationId}/link', summary: 'Lets whoever has the link of your variation of a record read it, or shuts it again.', params: variationParam, body: linkInput, answer: z.object({ visibility: z.enum(VARIATION_VISIBILITIES) }) });

export const submissionOperations = [listSubmissions, createSubmission, readSubmission, editSubmission, readSheet, addFiles, removeFile, readFile, readFileStructure, beginUpload, sendPart, finishUpload, letGoOfUpload, checkSubmission, answerFinding, answerCandidate, takeOverCandidate, lodgeSubmission, withdrawSubmission, reviseSubmission, listRuns, readFigures, watchRuns, stopRun, listVariations, askVariation, readVariation, openVariation] as const;
