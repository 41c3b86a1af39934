import type { z } from 'zod';
import type { Door } from '@/lib/policy/doors';
import type { Rate } from './rate';

/**
 * What one door of the interface takes and gives, without what it does. Route and OpenAPI document are
 * both made from it, so that neither can say something else than the other.
 */
export interface Operation<P = Record<string, never>, Q = Record<string, never>, B = undefined> {
  /** A row of `lib/policy/doors.ts`, such as `POST /api/v1/submissions/{id}/check`. */
  readonly door: Door;
  /** One sentence for readers: what it does, or what it gives. */
  readonly summary?: string;
  readonly params?: z.ZodType<P>;
  readonly query?: z.ZodType<Q>;
  /** A strict object; `stream` leaves a multipart body to the handler, `bytes` a plain one. */
  readonly body?: z.ZodType<B> | 'stream' | 'bytes';
  readonly rate?: Rate;
  /** Of success; 200 unless said. */
  readonly status?: number;
  /** The JSON of success. */
  readonly answer?: z.ZodType;
  /** The media type of a success that is not JSON. */
  readonly media?: string;
  /** Can be asked with `If-Match`. */
  readonly ifMatch?: boolean;
}

export const operation = <P = Record<string, never>, Q = Record<string, never>, B = undefined>(described: Operation<P, Q, B>): Operation<P, Q, B> => described;
