import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { watermark } from '@/lib/engine/synthesis/modes-text';
import { specimens } from '@/lib/tools/specimens';

const root = join(process.cwd(), 'content', 'specimens');
const stored = (folder: string, path: string) => readFileSync(join(root, folder, path), 'utf8');

describe.each(specimens.map(({ folder, files }) => [folder, files] as const))('the specimen %s', (folder, files) => {
  const made = files();
  it('is what the generator makes, byte for byte', () => {
    // Not toBe: a difference in 600 kB would be printed in full.
    for (const { path, text } of made)
      expect(text === stored(folder, path), `${folder}/${path} is stale: run lib/tools/make-specimens.ts`).toBe(true);
  });
  it('has no other files, and none above 1.5 MB', () => {
    expect(readdirSync(join(root, folder)).sort()).toEqual(made.map(({ path }) => path).sort());
    for (const { text } of made) expect(text.length).toBeLessThan(1.5e6);
  });
  it('says in every waveform that it is stylised', () => {
    const sheet = JSON.parse(stored(folder, 'claim.json')) as { waveforms: Record<string, { file: string }> };
    for (const { file } of Object.values(sheet.waveforms)) expect(stored(folder, file).slice(0, 400)).toContain(watermark);
  });
});
