import { createReadStream, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { Sha256 } from '@/lib/formats/sha256';
import { preview } from '@/lib/pipeline/preview';
import { runFolder } from '../../golden/run-folder';

const folderOf = (name: string): string => fileURLToPath(new URL(`../../../content/specimens/${name}`, import.meta.url));

function look(name: string, change: (sheet: { claims: Record<string, unknown>[] }) => void = () => undefined) {
  const folder = folderOf(name);
  const sheet = JSON.parse(readFileSync(path.join(folder, 'claim.json'), 'utf8')) as { claims: Record<string, unknown>[] };
  change(sheet);
  const said: number[] = [];
  const looked = preview({ sheetJson: sheet, openFile: (file) => createReadStream(path.join(folder, file)) }, { onProgress: (fraction) => void said.push(fraction), digest: () => new Sha256() });
  return looked.then((result) => ({ result, said }));
}

describe('a first look', () => {
  it.each(['spin-visible', 'loudness', 'radiated-energy'])('at %s gives the very numbers that the full run calls route A', async (name) => {
    const { result } = await look(name);
    const run = await runFolder(folderOf(name));
    if (!result.ok) throw new Error(JSON.stringify(result.error));
    expect(result.value.claims.map(({ id }) => id)).toEqual([...run.keys()]);
    for (const { id, points } of result.value.claims) {
      expect(points.map(({ value }) => value)).toEqual(run.get(id)?.points.map(({ routes }) => routes.A));
      expect(points.every(({ value }) => value !== null)).toBe(true);
    }
  }, 120_000);

  it('tells how far it is, and never goes back', async () => {
    const { said } = await look('spin-visible');
    expect(said.at(-1)).toBe(1);
    expect(said).toEqual([...said].sort((a, b) => a - b));
  });

  it('gives no number, and a finding, where the band leaves nothing to compute', async () => {
    const { result } = await look('spin-visible', (sheet) => sheet.claims.forEach((claim) => (claim['settings'] = { ...(claim['settings'] as object), fLowHz: 4000, fHighHz: 5000 })));
    if (!result.ok) throw new Error(JSON.stringify(result.error));
    expect(result.value.claims[0]?.points[0]?.value).toBeNull();
    expect(result.value.claims[0]?.findings.length).toBeGreaterThan(0);
  });

  it('refuses a sheet with the place of each problem, as the run does', async () => {
    const { result } = await look('spin-visible', (sheet) => Object.assign(sheet.claims[0] ?? {}, { quantity: 'brightness' }));
    expect(result.ok).toBe(false);
    if (!result.ok) expect(result.error[0]?.where).toContain('/claims/0/quantity');
  });
});
