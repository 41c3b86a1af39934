import { createHash } from 'node:crypto';
import { Transform } from 'node:stream';
import { SizeDiffers, type StoredObject } from '@/lib/storage/object-store';

export interface HashingStream extends Transform {
  /** Only after the stream has ended. */
  digest(): StoredObject;
}

/** Hashes and counts while bytes pass: a file is read once, however large. */
export function hashingStream(declaredBytes?: number): HashingStream {
  const hash = createHash('sha256');
  let bytes = 0;
  const stream = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      hash.update(chunk);
      bytes += chunk.length;
      done(declaredBytes !== undefined && bytes > declaredBytes ? new SizeDiffers(bytes, declaredBytes) : null, chunk);
    },
    flush(done) {
      done(declaredBytes !== undefined && bytes !== declaredBytes ? new SizeDiffers(bytes, declaredBytes) : null);
    },
  });
  return Object.assign(stream, { digest: () => ({ bytes, sha256: hash.digest('hex') }) });
}
