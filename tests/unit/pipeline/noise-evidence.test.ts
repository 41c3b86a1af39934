import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { synthesise } from '@/lib/engine/synthesis/synthesise';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { reproduce } from '@/lib/pipeline/reproduce';

const { t, modes } = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.03, stepM: 2, modes: ['22'] });
const wave = Array.from(t, (x, i) => `${x} ${modes[0]?.re[i]} ${modes[0]?.im[i]}`).join('\n');
const psd = (f: number): number => builtInCurve('G2')?.psd(f) ?? Number.NaN;
const table = (of: (f: number) => number, by = 1): string => Array.from({ length: 200 }, (_, i) => 10 * 160 ** (i / 199)).map((f) => `${f * by} ${of(f)}`).join('\n');
const files: Readonly<Record<string, string>> = {
  'wave.txt': wave,
  'asd.txt': table((f) => Math.sqrt(psd(f))),
  'psd.txt': table(psd),
  'characteristic.txt': table((f) => Math.sqrt(f * psd(f))),
  'half.txt': table((f) => psd(f) / 2),
  'twice.txt': table((f) => psd(f) * 2),
  'angular.txt': table(psd, 2 * Math.PI),
};

/** The loudness of one signal under one table as declared, with the search for another reading. */
async function searched(file: string, column: string, { sided, claimed, fLowHz = 70 }: { readonly sided?: 'two'; readonly claimed: string; readonly fLowHz?: number }) {
  const noise = { S: { file, columns: ['f', column], ...(sided && { sided }) } };
  const of = { quantity: 'snr', of: { a: 'A' }, noise: 'S', settings: { totalMassMsun: 60, fLowHz, fHighHz: 220, distanceMpc: 1000 } };
  const done = await reproduce(
    { sheetJson: { format: 'counterfoil-claim/1', waveforms: { A: { file: 'wave.txt', columns: ['t', 're22', 'im22'] } }, noise, claims: [{ id: 'C1', ...of, claimed }] }, openFile: async function* (name: string) { yield new TextEncoder().encode(files[name]); } },
    { withFigures: false, onProgress: () => undefined, cancelled: () => false, explain: { endedBy: () => null }, digest: () => { const hash = createHash('sha256'); return { update: (bytes) => void hash.update(bytes), hex: () => hash.digest('hex') }; } },
  );
  if (!done.ok) throw new Error(JSON.stringify(done.error));
  const [claim] = done.value.result.claims;
  if (!claim) throw new Error('no claim');
  return { value: claim.points[0]?.value ?? Number.NaN, candidates: claim.candidates ?? [] };
}

describe('what the numbers of a noise table say of its declaration', () => {
  it.each([
    ['asd.txt', 'psd', {}, 'C01:square', /is an amplitude density\.$/],
    ['psd.txt', 'asd', {}, 'C01:root', /is a power density\.$/],
    ['characteristic.txt', 'asd', {}, 'C01:characteristic', /is a characteristic strain\.$/],
    ['half.txt', 'psd', {}, 'C02:quieter', /holds half of the power of G2/],
    ['psd.txt', 'psd', { sided: 'two' }, 'C02:louder', /holds the whole power of G2/],
    ['twice.txt', 'psd', {}, 'C02:louder', /holds twice the power of G2/],
    ['angular.txt', 'psd', {}, 'C36:angular', /first column divided by 2π/],
  ] as const)('%s declared as %s %o: %s has its number and its reason', async (file, column, declared, id, reason) => {
    const right = (await searched('psd.txt', 'psd', { claimed: '1' })).value;
    const { candidates } = await searched(file, column, { ...declared, claimed: right.toPrecision(5) });
    const found = candidates.find((one) => one.id === id || one.readings.some(({ evidenceFrom }) => evidenceFrom !== null && reason.test(evidenceFrom)));
    expect(found?.standing).toBe('candidate');
    expect(found?.values[0]).toBeCloseTo(right, 1);
    expect(found?.readings.find(({ evidence }) => evidence === 'supports')?.evidenceFrom).toMatch(reason);
  });

  it('is nothing where the declaration is borne out', async () => {
    const { value } = await searched('psd.txt', 'psd', { claimed: '1' });
    const { candidates } = await searched('psd.txt', 'psd', { claimed: (value * Math.SQRT2).toPrecision(5) });
    expect(candidates.length).toBeGreaterThan(0);
    expect(candidates.flatMap(({ readings }) => readings).every(({ evidenceFrom }) => evidenceFrom === null)).toBe(true);
  });
});
