import type { Readable } from 'node:stream';

/**
 * The porch: bytes of strangers come in here and are hashed on the way, before anybody reads
 * meaning into them. A stored object is never changed; a corrected file is another object.
 * One interface, so that no other room knows which store stands behind it.
 */
export interface ObjectStore {
  /** Streams with bounded memory; a stream that breaks leaves no object behind. */
  put(key: string, stream: Readable, options?: { readonly size?: number }): Promise<StoredObject>;
  /** Throws `ObjectMissing` when there is no such key. */
  get(key: string): Promise<Readable>;
  head(key: string): Promise<{ readonly bytes: number } | undefined>;
  /** Removing what is not there is no error. */
  remove(key: string): Promise<void>;
}

export interface StoredObject {
  readonly bytes: number;
  /** Lower-case hexadecimal digest of exactly the bytes that were stored. */
  readonly sha256: string;
}

export class ObjectMissing extends Error {
  constructor(readonly key: string) {
    super(`the object store holds nothing under "${key}"`);
  }
}

/** The stream ended before or after the size its sender had declared. */
export class SizeDiffers extends Error {
  constructor(
    readonly saw: number,
    readonly declared: number,
  ) {
    super(`${saw} bytes arrived; the sender declared ${declared}`);
  }
}
