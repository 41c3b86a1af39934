import { expect, it } from 'vitest';
import { evidenceIn } from '@/lib/explain/flips/evidence';

const line = { where: 'psd.txt', inFile: true, text: 'strain noise, one-sided PSD, written to /home/ada/runs/psd.txt' };

it('words that tell are quoted with what stands around them', () => {
  expect(evidenceIn([line], { supports: [/one-sided/] }).evidenceFrom).toBe('psd.txt: “strain noise, one-sided PSD, written to /home/ada/runs/psd.txt”');
});

it('of a line that says whose it is only the words that tell are quoted', () => {
  expect(evidenceIn([{ ...line, saysWhose: true }], { supports: [/one-sided/] })).toMatchObject({ evidence: 'supports', evidenceFrom: 'psd.txt: “…one-sided…”' });
});
