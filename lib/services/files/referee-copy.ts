import { pipeline, Readable } from 'node:stream';
import { createGzip } from 'node:zlib';
import { withIdentityBlanked } from '@/lib/formats/blank-identity';
import { unpacked } from '@/lib/formats/gunzip';
import { join } from '@/lib/formats/text/scan-bytes';
import { tableLimits } from '@/lib/formats/text/table-parser';
import { isPublic, type SubmissionFacts } from '@/lib/policy/facts';

type Bytes = AsyncIterable<Uint8Array>;

/** A referee of what is not public yet reads a copy; authors, editor and later everybody read what was attached. */
export const readsCopy = (facts: SubmissionFacts): boolean => facts.authorship === null && facts.referee !== null && !isPublic(facts);

/** So many bytes tell text from arrays: these hold a zero byte among them, and text none. */
const telling = 4096;

/** The first bytes, and the whole from the beginning. */
async function peeled(source: Bytes): Promise<{ readonly head: Uint8Array; readonly whole: Bytes }> {
  const chunks = source[Symbol.asyncIterator]();
  let head: Uint8Array = new Uint8Array(0);
  let next = await chunks.next();
  for (; !next.done && head.length < telling; next = await chunks.next()) head = join(head, next.value);
  async function* whole(): AsyncGenerator<Uint8Array> {
    if (head.length > 0) yield head;
    for (; !next.done; next = await chunks.next()) yield next.value;
  }
  return { head, whole: whole() };
}

async function* blankedIfText(source: Bytes): AsyncGenerator<Uint8Array> {
  const { head, whole } = await peeled(source);
  yield* head.includes(0) ? whole : withIdentityBlanked(whole);
}

/** Nobody unpacks a small file into an endless one here: what no reading takes ends the copy. */
async function* asMuchAsIsRead(source: Bytes): AsyncGenerator<Uint8Array> {
  let bytes = 0;
  for await (const chunk of source) {
    bytes += chunk.length;
    if (bytes > tableLimits.bytes) throw new Error('the unpacked file is larger than a text file may be');
    yield chunk;
  }
}

/** The stream that a referee gets: text with those comments blanked that say whose it is, packed again where it was packed; arrays as they are. */
export async function refereeCopy(original: Readable): Promise<Readable> {
  const { head, whole } = await peeled(original);
  const packed = head[0] === 0x1f && head[1] === 0x8b;
  const copy = Readable.from(blankedIfText(packed ? asMuchAsIsRead(unpacked(whole)) : whole), { objectMode: false });
  copy.once('close', () => original.destroy());
  return packed ? pipeline(copy, createGzip(), () => undefined) : copy;
}
