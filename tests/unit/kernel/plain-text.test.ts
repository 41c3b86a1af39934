import { describe, expect, it } from 'vitest';
import { findUnkeepable } from '@/lib/kernel/plain-text';

describe('text that cannot be kept', () => {
  it.each([
    ['U+0000 in a value', { a: [1, { b: 'x\0' }] }, '/a/1/b'],
    ['half of a pair in a value', { a: '\ud800' }, '/a'],
    ['U+0000 in a name', { a: { 'b\0': 1 } }, '/a'],
  ])('is found: %s', (_what, value, where) => {
    expect(findUnkeepable(value)?.where).toBe(where);
  });

  it('is not seen in whole characters, numbers, nothing and pairs', () => {
    expect(findUnkeepable({ a: ['\u{1f30c}', 'M☉', 1, null, true], b: undefined })).toBeNull();
  });

  it('is not looked for without end: what is nested beyond all use is told as such', () => {
    expect(findUnkeepable(JSON.parse('['.repeat(100_000) + ']'.repeat(100_000)))?.saw).toMatch(/levels/);
  });
});
