import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import type { Door } from '@/lib/policy/doors';
import { getRecordBytes, type RecordPart } from '@/lib/services/records/get-record-bytes';
import { publishedResponse } from './published-response';

const params = z.strictObject({ id: z.string().max(40) });

/** One part of a published record as a route: the stored bytes, for everybody. */
export const servePart = (door: Door, part: RecordPart) =>
  defineRoute({
    door,
    params,
    handle: async ({ params: { id }, request }) => {
      const found = await getRecordBytes(id, part);
      return found.ok ? { ok: true as const, value: publishedResponse(found.value, request) } : found;
    },
    respond: (response) => response,
  });
