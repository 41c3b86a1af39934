import busboy from 'busboy';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { DoorError } from './problem-response';
import type { UploadParts } from './upload-parts';

export interface UploadPart {
  /** Name of the form's field. */
  readonly field: string;
  /** The path the sender gives the file. */
  readonly name: string;
  readonly stream: Readable;
}

const MAX_PARTS = 80;

/**
 * Walks a multipart body file by file, in order, never holding more than a few chunks: the next file
 * is read when `take` has finished with this one. Plain fields are handed to `field`.
 * `take` has to read or drain each stream; its error ends the walk. With `parts` all is hashed on the way.
 */
export async function readUpload(request: Request, take: (part: UploadPart) => Promise<void>, field: (name: string, value: string) => void = () => undefined, parts?: UploadParts): Promise<Result<number, DoorError>> {
  if (!request.body) return err({ code: 'invalid', sentence: 'The request has no body; expected files as multipart/form-data.' });
  const type = request.headers.get('content-type') ?? '';
  if (!/^multipart\/form-data\s*;/i.test(type)) return err({ code: 'unsupported-media', sentence: `The body is ${type || 'of no declared type'}; expected multipart/form-data.` });
  const parser = makeParser(type);
  if (!parser) return err({ code: 'invalid', sentence: 'The multipart header names no boundary.' });
  const took = parts ? (part: UploadPart) => take({ ...part, stream: parts.hashing(part.field, part.name, part.stream) }) : take;
  const noted = (name: string, value: string): void => {
    parts?.addField(name, value);
    field(name, value);
  };
  return walk(request.body, parser, took, noted);
}

function makeParser(type: string): busboy.Busboy | null {
  try {
    return busboy({ headers: { 'content-type': type }, preservePath: true, defParamCharset: 'utf8', limits: { files: MAX_PARTS, fields: 8, parts: MAX_PARTS + 8, fieldSize: 4 * 1024 * 1024 } });
  } catch {
    return null;
  }
}

async function walk(body: ReadableStream<Uint8Array>, parser: busboy.Busboy, take: (part: UploadPart) => Promise<void>, field: (name: string, value: string) => void): Promise<Result<number, DoorError>> {
  let files = 0;
  let tooMany = false;
  let last: Promise<void> = Promise.resolve();
  let failed: unknown;
  const source = Readable.fromWeb(body as Parameters<typeof Readable.fromWeb>[0]);
  parser.on('field', (name, value) => field(name, value));
  parser.on('filesLimit', () => (tooMany = true));
  parser.on('file', (name, stream, info) => {
    files++;
    stream.on('error', () => undefined); // the taker sees it too; without this listener it would be nobody's
    last = last.then(() => take({ field: name, name: info.filename ?? '', stream })).catch((error: unknown) => {
      failed ??= error;
      stream.resume();
      source.destroy(error instanceof Error ? error : new Error(String(error)));
    });
  });
  const parsed = await pipeline(source, parser).then(() => null, (error: unknown) => error ?? new Error('the body ended early'));
  await last;
  if (failed !== undefined) throw failed;
  if (parsed) return err({ code: 'invalid', sentence: 'The upload ended early or is not a well-formed multipart body. Nothing of the file was kept; send it again.' });
  return tooMany ? err({ code: 'limit', sentence: `More than ${MAX_PARTS} files came in one request.` }) : ok(files);
}
