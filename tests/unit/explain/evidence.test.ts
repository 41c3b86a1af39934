import { expect, it } from 'vitest';
import { evidenceIn } from '@/lib/explain/flips/evidence';

const line = { where: 'psd.txt', inFile: true, text: 'strain noise, one-sided PSD, written to /home/ada/runs/psd.txt' };

it('words that tell are quoted with what stands around them', () => {
  expect(evidenceIn([line], { supports: [/one-sided/] }).evidenceFrom).toBe('psd.txt: “strain noise, one-sided PSD, written to /home/ada/runs/psd.txt”');
});

it('of a line that says whose it is only the words that tell are quoted', () => {
  expect(evidenceIn([{ ...line, saysWhose: true }], { supports: [/one-sided/] })).toMatchObject({ evidence: 'supports', evidenceFrom: 'psd.txt: “…one-sided…”' });
});

it('no word is cut where the quotation begins or ends', () => {
  const text = `${'a second-generation '.repeat(4)}one-sided ${'spectrum throughout '.repeat(4)}`;
  expect(evidenceIn([{ ...line, text }], { supports: [/one-sided/] }).evidenceFrom).toBe('psd.txt: “…second-generation a second-generation one-sided spectrum throughout spectrum…”');
});
