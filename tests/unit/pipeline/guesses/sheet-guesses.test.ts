import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { synthesise } from '@/lib/engine/synthesis/synthesise';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { resultSchema } from '@/lib/claims/result-schema';
import { guessFiles } from '@/lib/pipeline/guesses/guess-files';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import { reproduce } from '@/lib/pipeline/reproduce';

const { t, modes } = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.022, stepM: 0.5, modes: ['22'] });
const quadrupole = modes.find(({ m }) => m === 2);
const rows = (turn: 1 | -1): string => Array.from(t, (x, i) => `${x} ${quadrupole?.re[i]} ${turn * (quadrupole?.im[i] ?? 0)}`).join('\n');
const curve = builtInCurve('G2');
const noise = Array.from({ length: 200 }, (_, i) => 10 * 819.2 ** (i / 199)).map((f) => `${f} ${Math.sqrt(curve?.psd(f) ?? 0)}`).join('\n');

const files: Readonly<Record<string, string>> = { 'a.txt': `# mass1 = 0.5, mass2 = 0.5\n${rows(1)}`, 'turned.txt': rows(-1), 'noise.txt': noise };
const source = { openFile: async function* (name: string) { yield new TextEncoder().encode(files[name]); } };
const digest = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};
const columns = ['t', 're22', 'im22'];
const look = (sheet: unknown) => guessFiles(sheet, source, digest);
const brief = (guesses: readonly SheetGuess[]): string[] => guesses.map(({ field, standing, agrees, value }) => `${field} ${standing} ${value} ${agrees ? 'agrees' : 'contradicts'}`);

describe('the guesses of a sheet', () => {
  it('name the word of the sheet, what is in use and what would say what the data say', async () => {
    const found = await look({ waveforms: { A: { file: 'turned.txt', columns } } });
    expect(brief(found)).toEqual(['/waveforms/A/polarisation assumed plus-minus-i-cross contradicts', '/waveforms/A/timeUnit assumed M agrees', '/waveforms/A/variable assumed strain agrees']);
    expect(found[0]).toMatchObject({ changes: [{ field: '/waveforms/A/polarisation', value: 'plus-plus-i-cross' }], convention: { id: 'C22', title: 'Sense of rotation' } });
    expect(found[0]?.convention?.sentence).toMatch(/\.$/);
    expect(found[1]).toMatchObject({ convention: null, changes: [{ field: '/waveforms/A/timeUnit', value: 'M' }] });
  });

  it('know a declaration from an assumption', async () => {
    const found = await look({ waveforms: { A: { file: 'turned.txt', columns, polarisation: 'plus-minus-i-cross' }, B: { file: 'turned.txt', columns, polarisation: 'plus-plus-i-cross' } } });
    expect(brief(found).filter((line) => line.includes('polarisation'))).toEqual(['/waveforms/A/polarisation declared plus-minus-i-cross contradicts', '/waveforms/B/polarisation declared plus-plus-i-cross agrees']);
  });

  it('take the mass ratio from the head of a file, and the meaning of a noise column from its numbers', async () => {
    const found = await look({ waveforms: { A: { file: 'a.txt', columns } }, noise: { S: { file: 'noise.txt', columns: ['f', 'psd'] } } });
    expect(found.find(({ about }) => about === 'mass-ratio')).toMatchObject({ field: '/waveforms/A/binary/massRatio', standing: 'assumed', value: null, changes: [{ field: '/waveforms/A/binary/massRatio', value: 1 }] });
    expect(found.find(({ about }) => about === 'noise-column')).toMatchObject({ part: 'noise', name: 'S', agrees: false, changes: [{ field: '/noise/S/columns', value: ['f', 'asd'] }] });
    expect(found.find(({ about }) => about === 'sided')).toMatchObject({ field: '/noise/S/sided', standing: 'assumed', agrees: true });
  });

  it('look at every file that can be read, whatever another is', async () => {
    const found = await look({ waveforms: { A: { file: 'noise.txt', columns: ['t', 're22', 'im22', 're33', 'im33'] }, 'B/1': { file: 'turned.txt', columns }, C: { columns: 7 } } });
    expect(brief(found)[0]).toBe('/waveforms/B~11/polarisation assumed plus-minus-i-cross contradicts');
  });

  it('travel with a result, which they do not change', async () => {
    const sheetJson = { format: 'counterfoil-claim/1', waveforms: { A: { file: 'turned.txt', columns } }, claims: [{ id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0.036' }] };
    const run = (sheet: unknown) => reproduce({ ...source, sheetJson: sheet }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest });
    const [as, confirmed] = [await run(new TextEncoder().encode(JSON.stringify(sheetJson))), await run({ ...sheetJson, waveforms: { A: { ...sheetJson.waveforms.A, polarisation: 'plus-plus-i-cross' } } })];
    if (!as.ok || !confirmed.ok) throw new Error('the sheet should be measured');
    const number = (result: typeof as.value.result): number => result.claims[0]?.points[0]?.value ?? Number.NaN;
    expect(number(as.value.result)).toBeCloseTo(number(confirmed.value.result), 9);
    const of = (result: typeof as.value.result) => result.guesses?.find(({ about }) => about === 'rotation');
    expect(of(as.value.result)).toMatchObject({ standing: 'assumed', agrees: false });
    expect(of(confirmed.value.result)).toMatchObject({ standing: 'declared', agrees: true });
    expect(resultSchema.safeParse(as.value.result).success).toBe(true);
  });
});
