import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { Sha256 } from '@/lib/formats/sha256';
import { seededRandom } from '../../support/seeded-random';

const platform = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

describe('the digest that is fed piece by piece', () => {
  it('gives the published digests of "abc" and of nothing (FIPS 180-4 examples)', () => {
    expect(new Sha256().update(new TextEncoder().encode('abc')).hex()).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
    expect(new Sha256().hex()).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855');
  });

  it('agrees with the platform at every length around the edges of a block, however the bytes are cut', () => {
    const random = seededRandom(7);
    for (let length = 0; length < 200; length++) {
      const bytes = Uint8Array.from({ length }, () => Math.floor(256 * random()));
      const cut = Math.floor(length * random());
      expect(new Sha256().update(bytes.subarray(0, cut)).update(bytes.subarray(cut)).hex()).toBe(platform(bytes));
    }
  });

  it('keeps its place beyond the first 2³² bits', () => {
    const piece = new Uint8Array(2 ** 24).fill(0x5a);
    const own = new Sha256();
    const theirs = createHash('sha256');
    for (let i = 0; i < 33; i++) {
      own.update(piece);
      theirs.update(piece);
    }
    expect(own.hex()).toBe(theirs.digest('hex'));
  }, 60_000);
});
