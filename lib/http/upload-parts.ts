import { createHash } from 'node:crypto';
import { Transform, type Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

/**
 * What came in one multipart body, by field, name and SHA-256: two requests are the same when these
 * are, whatever boundary the sender drew.
 */
export class UploadParts {
  private readonly parts: (readonly [field: string, name: string | null, sha256: string])[] = [];

  addField(field: string, value: string): void {
    this.parts.push([field, null, createHash('sha256').update(value).digest('hex')]);
  }

  /** The same bytes, hashed as they pass. */
  hashing(field: string, name: string, stream: Readable): Readable {
    const hash = createHash('sha256');
    const passing = new Transform({
      transform(chunk: Buffer, _encoding, done) {
        hash.update(chunk);
        done(null, chunk);
      },
      flush: (done) => {
        this.parts.push([field, name, hash.digest('hex')]);
        done();
      },
    });
    // A stream that breaks is told to whoever reads `passing`.
    pipeline(stream, passing).catch(() => undefined);
    return passing;
  }

  list(): readonly unknown[] {
    return this.parts;
  }
}
