import { z } from 'zod';
import { createDocument, type ZodOpenApiOperationObject, type ZodOpenApiPathsObject, type ZodOpenApiResponseObject } from 'zod-openapi';
import { problemDocumentSchema } from '@/lib/services/problem-schema';
import { OPERATIONS } from './contract/operations';
import type { Operation } from './operation';
import { scopesOfDoor } from './token-scope';

type Described = Operation<unknown, unknown, unknown>;

const folder = z
  .object({
    claim: z.string().optional().describe('The claim sheet: the text of claim.json, or the file.'),
    file: z.array(z.string().meta({ contentEncoding: 'binary' })).optional().describe('The files that the sheet names, each under its relative path, or the whole as one .zip.'),
  })
  .meta({ id: 'Folder' });

const files = z.object({ file: z.array(z.string().meta({ contentEncoding: 'binary' })).describe('Each under its relative path.') }).meta({ id: 'Files' });

const problem = (description: string): ZodOpenApiResponseObject => ({ description, content: { 'application/problem+json': { schema: problemDocumentSchema } } });

const etag = { etag: { schema: { type: 'string' as const }, description: 'Strong. Send it back as If-None-Match, or as If-Match with an edit.' } };

function success(operation: Described): ZodOpenApiResponseObject {
  const description = operation.summary ?? operation.door;
  const reads = operation.door.startsWith('GET ');
  const headers = reads && operation.answer ? { headers: etag } : {};
  if (operation.media) return { description, content: { [operation.media]: {} } };
  return { description, ...headers, content: { 'application/json': { schema: operation.answer ?? z.unknown() } } };
}

/** Which refusals a door can give beside those every door can. */
function refusals(operation: Described): Record<string, ZodOpenApiResponseObject> {
  const writes = !operation.door.startsWith('GET ');
  const scoped = scopesOfDoor(operation.door) !== null;
  return {
    ...(scoped && { '401': problem('Nobody is signed in, or the token is not known, expired or revoked.'), '403': problem('Not part of your role, or of the token’s scopes.') }),
    ...(operation.params && { '404': problem('Nothing here, or nothing you may see.') }),
    ...(writes && { '409': problem('Things have moved on, or the Idempotency-Key was used for another request.'), '413': problem('Too large.'), '415': problem('Not a form we read.'), '429': problem('Too often; Retry-After says when to come back.') }),
    ...((operation.ifMatch || /\/(check|lodge|threads|reports|decisions|invitations|reminders)$/.test(operation.door)) && { '412': problem('Not the version that If-Match names, or something has to be done first.') }),
    ...(operation.door.startsWith('PATCH ') && { '428': problem('The edit names no version.') }),
    '422': problem('Not acceptable as sent; every problem is listed with its place.'),
  };
}

function headersOf(operation: Described): z.ZodObject | null {
  const shape = {
    ...(operation.door.startsWith('POST ') && { 'Idempotency-Key': z.string().min(8).max(200).optional().describe('The same key and request within 24 hours get the same answer and act no second time.') }),
    ...(operation.ifMatch && { 'If-Match': z.string().optional().describe('ETag of the draft that the act was meant for.') }),
    ...(operation.door.startsWith('GET ') && operation.answer && { 'If-None-Match': z.string().optional().describe('ETag of the answer you hold; 304 when it still is the same.') }),
  };
  return Object.keys(shape).length > 0 ? z.object(shape) : null;
}

function describe(operation: Described): ZodOpenApiOperationObject {
  const scopes = scopesOfDoor(operation.door);
  const header = headersOf(operation);
  const requestParams = { ...(operation.params && { path: operation.params as z.ZodObject }), ...(operation.query && { query: operation.query as z.ZodObject }), ...(header && { header }) };
  const session = { session: [] };
  return {
    operationId: operationIdOf(operation.door),
    summary: operation.summary ?? '',
    ...(Object.keys(requestParams).length > 0 && { requestParams }),
    ...bodyOf(operation),
    responses: {
      [String(operation.status ?? 200)]: success(operation),
      ...(operation.media === 'text/event-stream' && { '204': { description: 'Nothing runs.' } }),
      ...(operation.door.startsWith('GET ') && operation.answer && { '304': { description: 'Still the same.' } }),
      ...refusals(operation),
    },
    security: scopes === null ? [] : scopes.length === 0 ? [session] : [...scopes.map((scope) => ({ bearer: [scope] })), session],
  };
}

const bodyOf = ({ body, door }: Described): Pick<ZodOpenApiOperationObject, 'requestBody'> => {
  if (body === undefined) return {};
  if (body === 'bytes') return { requestBody: { required: true, content: { 'application/octet-stream': {} } } };
  if (body === 'stream') return { requestBody: { required: true, content: { 'multipart/form-data': { schema: door.endsWith('/files') ? files : folder } } } };
  return { requestBody: { required: !door.startsWith('GET '), content: { 'application/json': { schema: body } } } };
};

/** `POST /api/v1/submissions/{id}/check` → `postSubmissionsIdCheck`. */
export const operationIdOf = (door: string): string =>
  door.replace('/api/v1', '').replace(/^[A-Z]+/, (method) => method.toLowerCase()).replace(/[^A-Za-z0-9]+([A-Za-z0-9]?)/g, (_, next: string) => next.toUpperCase());

function pathsOf(): ZodOpenApiPathsObject {
  const paths: Record<string, Record<string, ZodOpenApiOperationObject>> = {};
  for (const operation of OPERATIONS as readonly Described[]) {
    const [method = '', path = ''] = operation.door.split(' ');
    paths[path] = { ...paths[path], [method.toLowerCase()]: describe(operation) };
  }
  return paths;
}

let made: ReturnType<typeof createDocument> | undefined;

/** OpenAPI 3.1 of version 1, from the schemas that judge what comes in and the tests that judge what goes out. */
export function openApiDocument(): ReturnType<typeof createDocument> {
  made ??= createDocument(
    {
      openapi: '3.1.1',
      info: { title: 'Counterfoil', version: '1', description: 'Claims about waveforms, recomputed and reviewed. The page for people is at /interface.' },
      servers: [{ url: '/' }],
      paths: pathsOf(),
      components: {
        securitySchemes: {
          bearer: { type: 'http', scheme: 'bearer', description: 'A token from your account page, `cf_…`. A requirement names one scope that suffices.' },
          session: { type: 'apiKey', in: 'cookie', name: 'counterfoil.session', description: 'The session of a browser on this site; a write is taken from this site’s own pages only.' },
        },
      },
    },
    // Fields may be added to answers, so nobody may rely on there being no others.
    { override: ({ jsonSchema, io }) => void (io === 'output' && jsonSchema.additionalProperties === false && delete jsonSchema.additionalProperties) },
  );
  return made;
}
