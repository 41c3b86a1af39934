import { FileRefused } from './open-file';

const damaged = () => new FileRefused('a damaged or unfinished gzip stream', 'a whole gzip file', 'Compress the file again, or send it uncompressed.');

/** Passes text through and unpacks gzip, known by its first two bytes and not by the file's name. */
export async function* unpacked(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  const chunks = source[Symbol.asyncIterator]();
  try {
    const head = await firstBytes(chunks);
    const rest = () => following(head, chunks);
    if (head[0] === 0x1f && head[1] === 0x8b) yield* gunzip(rest());
    else yield* rest();
  } finally {
    await chunks.return?.();
  }
}

async function firstBytes(chunks: AsyncIterator<Uint8Array>): Promise<Uint8Array> {
  let head: Uint8Array = new Uint8Array(0);
  while (head.length < 2) {
    const next = await chunks.next();
    if (next.done) return head;
    const joined = new Uint8Array(head.length + next.value.length);
    joined.set(head);
    joined.set(next.value, head.length);
    head = joined;
  }
  return head;
}

async function* following(head: Uint8Array, chunks: AsyncIterator<Uint8Array>): AsyncGenerator<Uint8Array> {
  if (head.length > 0) yield head;
  for (let next = await chunks.next(); !next.done; next = await chunks.next()) yield next.value;
}

async function* gunzip(packed: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  const stream = new DecompressionStream('gzip');
  const reader = stream.readable.getReader();
  const fed = feed(packed, stream.writable.getWriter());
  try {
    for (let part = await next(reader); part; part = await next(reader)) yield part;
    const failure = await fed;
    if (failure) throw failure;
  } finally {
    await reader.cancel().catch(() => undefined);
    await fed;
  }
}

async function next(reader: ReadableStreamDefaultReader<Uint8Array>): Promise<Uint8Array | undefined> {
  try {
    return (await reader.read()).value;
  } catch {
    throw damaged();
  }
}

/** Resolves with what the source threw, so that a missing file is not called a damaged one. */
async function feed(packed: AsyncIterable<Uint8Array>, writer: WritableStreamDefaultWriter<BufferSource>): Promise<unknown> {
  try {
    for await (const chunk of packed) await writer.write(chunk as Uint8Array<ArrayBuffer>);
    await writer.close();
    return undefined;
  } catch (thrown) {
    await writer.abort(thrown).catch(() => undefined);
    return thrown instanceof FileRefused ? thrown : damaged();
  }
}
