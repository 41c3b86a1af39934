import { z } from 'zod';
import { failedJobsSchema } from '@/lib/services/jobs/failed-job-schema';
import { pageQuery, pageSchema } from '@/lib/services/paging';
import { publishedRecordSchema, registerRowSchema } from '@/lib/services/records/register-schema';
import { operation } from '../operation';
import { idParam } from './submissions';

const word = z.string().max(200).optional();
const recordParam = z.strictObject({ id: z.string().max(40) });

export const listRecords = operation({
  door: 'GET /api/v1/records',
  summary: 'Published records, the newest entry first.',
  query: z.strictObject({
    ...pageQuery,
    text: word.describe('Words of title, authors, quantities or statement.'),
    quantity: word.describe('A quantity that is claimed.'),
    verdict: word.describe('A verdict that some claim has.'),
    noise: word.describe('Id of a noise curve, or `attached`, or `none`.'),
    standing: word.describe('How the record stands today.'),
    from: word.describe('First day of entry.'),
    to: word.describe('Last day of entry.'),
  }),
  answer: pageSchema(registerRowSchema),
});
export const readRecord = operation({ door: 'GET /api/v1/records/{id}', summary: 'A record as the bytes that were signed.', params: recordParam, answer: publishedRecordSchema });
export const readBadge = operation({ door: 'GET /api/v1/records/{id}/badge.svg', summary: 'The badge as it stands today.', params: recordParam, media: 'image/svg+xml' });
export const readOpenApi = operation({ door: 'GET /api/v1/openapi.json', summary: 'This document.', answer: z.looseObject({ openapi: z.string(), paths: z.record(z.string(), z.unknown()) }) });

export const listFailedJobs = operation({ door: 'GET /api/v1/jobs/failed', summary: 'Jobs that were laid aside after their last try.', answer: failedJobsSchema });
export const retryJob = operation({ door: 'POST /api/v1/jobs/{id}/retry', summary: 'Asks for a laid-aside job once more.', params: idParam, status: 202, answer: z.null() });

export const recordOperations = [listRecords, readRecord, readBadge, readOpenApi] as const;
export const jobOperations = [listFailedJobs, retryJob] as const;
