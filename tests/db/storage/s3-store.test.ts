import { createHash, randomBytes } from 'node:crypto';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ObjectMissing, SizeDiffers, type ObjectStore } from '@/lib/storage/object-store';
import { createS3Store } from '@/lib/storage/s3-store';
import { startObjectStore, type TestObjectStore } from '../../support/fakes';

const MIB = 1024 * 1024;

describe('the object store keeps exactly the bytes it was given', () => {
  let fake: TestObjectStore;
  let store: ObjectStore;
  beforeAll(async () => {
    fake = await startObjectStore();
    store = createS3Store(fake.env);
  });
  afterAll(() => fake.stop());

  const digestOf = async (stream: Readable): Promise<string> => {
    const hash = createHash('sha256');
    for await (const chunk of stream) hash.update(chunk as Buffer);
    return hash.digest('hex');
  };

  it.each([0, 1, 5 * MIB, 11 * MIB + 7])('%i bytes come back with the digest that was computed on the way in', async (bytes) => {
    const body = randomBytes(bytes);
    const stored = await store.put(`files/${bytes}`, Readable.from(chunksOf(body)), { size: bytes });
    expect(stored).toEqual({ bytes, sha256: createHash('sha256').update(body).digest('hex') });
    expect(await store.head(`files/${bytes}`)).toEqual({ bytes });
    expect(await digestOf(await store.get(`files/${bytes}`))).toBe(stored.sha256);
  });

  it('a source that breaks in the middle leaves no object and gives its own reason', async () => {
    const source = Readable.from(
      (function* () {
        yield randomBytes(6 * MIB);
        throw new Error('the sender hung up');
      })(),
    );
    await expect(store.put('files/broken', source)).rejects.toThrow('the sender hung up');
    expect(await store.head('files/broken')).toBeUndefined();
  });

  it.each([
    ['more', 3 * MIB],
    ['fewer', 5 * MIB],
  ])('a stream with %s bytes than declared is refused', async (_which, size) => {
    await expect(store.put('files/size', Readable.from(chunksOf(randomBytes(4 * MIB))), { size })).rejects.toThrow(SizeDiffers);
    expect(await store.head('files/size')).toBeUndefined();
  });

  it('a store that cannot be reached lets go of the source', async () => {
    const nowhere = createS3Store({ ...fake.env, S3_ENDPOINT: 'http://127.0.0.1:9' });
    const source = Readable.from(chunksOf(randomBytes(MIB)));
    await expect(nowhere.put('files/nowhere', source)).rejects.toThrow();
    expect(source.destroyed).toBe(true);
  });

  it('a key that holds nothing says so, and can be removed without complaint', async () => {
    await expect(store.get('files/none')).rejects.toThrow(ObjectMissing);
    await store.remove('files/none');
    await store.put('files/gone', Readable.from(['x']));
    await store.remove('files/gone');
    expect(await store.head('files/gone')).toBeUndefined();
  });
});

function chunksOf(body: Buffer): Buffer[] {
  const chunks: Buffer[] = [];
  for (let at = 0; at < body.length; at += 64 * 1024) chunks.push(body.subarray(at, at + 64 * 1024));
  return chunks;
}
