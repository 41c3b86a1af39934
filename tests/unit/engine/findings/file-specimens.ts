import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import type { FindingSpecimen } from './finding-specimen';
import { findingsOfSheet } from './sheet-run';

/** A pulse of (2,2) on 401 rows, printed; the same whatever is changed around it. */
const rows = Array.from({ length: 401 }, (_, i) => {
  const t = (i - 200) / 2;
  const size = 0.3 * Math.exp(-(t * t) / 800);
  return `${t} ${(size * Math.cos(0.5 * t)).toPrecision(8)} ${(-size * Math.sin(0.5 * t)).toPrecision(8)}`;
});

const energySheet = (a: object = {}, more: object = {}) => ({
  waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'], negativeM: 'mirror', ...a } },
  claims: [{ id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0.01', ...more }],
});
const energy = (lines: readonly string[], a: object = {}) => findingsOfSheet(energySheet(a), { 'a.txt': `${lines.join('\n')}\n` });
const declared = (settings: object) => findingsOfSheet(energySheet({}, { settings }), { 'a.txt': `${rows.join('\n')}\n` });
const fitOf = (settings: object) => findingsOfSheet({ claims: [{ id: 'C1', quantity: 'remnant-fit', of: {}, settings, claimed: '0.96' }] }, {});
const replaced = (at: number, ...lines: string[]): string[] => [...rows.slice(0, at), ...lines, ...rows.slice(at + 1)];

const pairSheet = (second: string) => ({
  waveforms: { A: { file: 'low.txt', columns: ['t', 're22', 'im22'], negativeM: 'mirror' }, B: { file: second, columns: ['t', 're22', 'im22'], negativeM: 'mirror' } },
  claims: [{ id: 'C1', quantity: 'phase-difference', of: { a: 'A', b: 'B' }, settings: { alignment: 'none' }, claimed: '0.0' }],
});
const quieter = rows.map((row) => row.split(' ').map((x, i) => (i === 0 ? x : String(0.99 * Number(x)))).join(' '));

const G2 = builtInCurve('G2')!;
/** The design curve at 300 points, with a factor on its lowest term. */
const curveRows = (lowFrequency = 1): string[] =>
  Array.from({ length: 300 }, (_, i) => {
    const f = i === 299 ? 8192 : 10 * 819.2 ** (i / 299);
    const psd = G2.psd(f) + (lowFrequency - 1) * 1e-48 * 0.0152 * (f / 245.4) ** -4;
    return `${f.toPrecision(9)} ${Math.sqrt(psd).toPrecision(8)}`;
  });
const snr = (noise: readonly string[], fLowHz = 20, column = 'asd') =>
  findingsOfSheet(
    {
      waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'], negativeM: 'mirror' } },
      noise: { S: { file: 'design.txt', columns: ['f', column] } },
      claims: [{ id: 'C1', quantity: 'snr', of: { a: 'A' }, noise: 'S', settings: { totalMassMsun: 60, distanceMpc: 1000, fLowHz }, claimed: '30' }],
    },
    { 'a.txt': `${rows.join('\n')}\n`, 'design.txt': `${noise.join('\n')}\n` },
  );

export const fileSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V01', code: 'formats/not-finite', level: 'stops-lodging', when: 'a value is NaN',
    raises: () => energy(replaced(120, '-40 nan 0.1')), says: ['Line 121 of a.txt', 're22', 't = -40 M'], silent: () => energy(rows),
  },
  {
    number: 'V02', code: 'formats/time-not-monotone', level: 'stops-lodging', when: 'time goes backwards',
    raises: () => energy(replaced(120, '-41 0.1 0.1')), says: ['line 121', 't = -40.5 M', 't = -41 M'], silent: () => energy(rows),
  },
  {
    number: 'V03', code: 'formats/gap', level: 'needs-answer', when: 'eight rows are missing in the signal',
    raises: () => energy([...rows.slice(0, 195), ...rows.slice(203)]), says: ['gap of 4.5 M', 't = -3 M', '0.36 of a wave cycle'], silent: () => energy(rows),
  },
  {
    number: 'V03', code: 'formats/gap', level: 'worth-a-look', when: 'one row is missing in the signal',
    raises: () => energy([...rows.slice(0, 195), ...rows.slice(196)]), says: ['gap of 1 M', '0.08 of a wave cycle'], silent: () => energy(rows),
  },
  {
    number: 'V18', code: 'engine/band-beyond-curve', level: 'stops-lodging', when: 'the claim integrates from below the curve',
    raises: () => snr(curveRows(), 5), says: ['starts at 10 Hz', 'from 5 Hz'], silent: () => snr(curveRows()),
  },
  {
    number: 'V19', code: 'engine/curve-invalid', level: 'stops-lodging', when: 'a noise value is negative',
    raises: () => snr(curveRows().map((row, i) => (i === 40 ? row.replace(' ', ' -') : row))), says: ['must be positive', /-\d/], silent: () => snr(curveRows()),
  },
  {
    number: 'V19', code: 'engine/curve-coarse', level: 'worth-a-look', when: 'there are three points an octave',
    raises: () => snr(curveRows().filter((_, i) => i % 10 === 0 || i === 299)), says: ['points an octave', /from \S+ to \S+ Hz/], silent: () => snr(curveRows()),
  },
  {
    number: 'V20', code: 'engine/curve-identity', level: 'needs-answer', when: 'one coefficient of a published curve is mistyped',
    raises: () => snr(['# second-generation design (G2)', ...curveRows(0.0512 / 0.0152)]), says: ['called G2', '×1.83 above it', '10–20 Hz ×1.83', /160–8192 Hz equal/],
    silent: async () => [...(await snr(['# second-generation design (G2)', ...curveRows()])), ...(await snr(['10 3e-23', '100 3e-23', '8192 3e-23']))],
  },
  {
    number: 'V20', code: 'engine/curve-identity', level: 'needs-answer', when: 'amplitudes are read as powers, and nothing names the curve',
    raises: () => snr(curveRows(), 20, 'psd'), says: ['close to G2', 'square root'], silent: () => snr(curveRows().map((row) => { const [f, s] = row.split(' '); return `${f} ${Number(s) ** 2}`; }), 20, 'psd'),
  },
  {
    number: 'V22', code: 'claims/mass-sums', level: 'needs-answer', when: 'the component masses in a header are those of the remnant',
    raises: () => energy(['# mass1 = 0.4758', '# mass2 = 0.4758', ...rows]), says: ['lines 1 and 2', '0.9516 M instead of 1 M', 'remnant mass'], silent: () => energy(['# mass1 = 0.5, mass2 = 0.5, q = 1', ...rows]),
  },
  {
    number: 'V22', code: 'claims/mass-sums', level: 'needs-answer', when: 'the sheet gives another mass ratio than the header',
    raises: () => energy(['# mass ratio: 3', ...rows], { binary: { massRatio: 2 } }), says: ['massRatio 2', 'line 1 of a.txt', 'gives 3'], silent: () => energy(['# mass ratio: 0.5', ...rows], { binary: { massRatio: 2 } }),
  },
  {
    number: 'V22', code: 'claims/mass-sums', level: 'needs-answer', when: 'the remnant is heavier than the system',
    raises: () => energy(rows, { binary: { admEnergy: 0.99, remnantMass: 0.995 } }), says: ['0.995', '0.99'], silent: () => energy(rows, { binary: { admEnergy: 0.99, remnantMass: 0.952 } }),
  },
  {
    number: 'V22', code: 'claims/mass-sums', level: 'needs-answer', when: 'a claim on a waveform declares a mass ratio below one',
    raises: () => declared({ includeEnergyBeforeStart: true, massRatio: 0.5 }), says: ['massRatio is 0.5', 'q ≥ 1'], silent: () => declared({ includeEnergyBeforeStart: true, massRatio: 2 }),
  },
  {
    number: 'V22', code: 'claims/mass-sums', level: 'needs-answer', when: 'a claim on no waveform declares a mass ratio below one',
    raises: () => fitOf({ massRatio: 0.5 }), says: ['massRatio is 0.5', 'q ≥ 1'], silent: () => fitOf({ massRatio: 2 }),
  },
  {
    number: 'V23', code: 'claims/spin-above-one', level: 'stops-lodging', when: 'a spin is 1.44',
    raises: () => energy(rows, { binary: { massRatio: 1, chi1z: 1.44, chi2z: 0 } }), says: ['chi1z is 1.44', '−1 and 1'], silent: () => energy(rows, { binary: { massRatio: 1, chi1z: 0.44, chi2z: 0 } }),
  },
  {
    number: 'V28', code: 'formats/duplicate-files', level: 'stops-lodging', when: 'two runs are one file',
    raises: () => findingsOfSheet(pairSheet('high.txt'), { 'low.txt': `${rows.join('\n')}\n`, 'high.txt': `${rows.join('\n')}\n` }), says: ['low.txt and high.txt', 'byte for byte'],
    silent: () => findingsOfSheet(pairSheet('high.txt'), { 'low.txt': `${rows.join('\n')}\n`, 'high.txt': `${quieter.join('\n')}\n` }),
  },
  {
    number: 'V29', code: 'formats/hidden-identity', level: 'needs-answer', when: 'a header names a home directory',
    raises: () => energy(['# Ninefold, run 12', '# thinned by 4', '# from /home/rosalind/runs/q1/h22.dat', ...rows]), says: ['Header line 3 of a.txt', 'directory'],
    silent: () => energy(['# Ninefold, run 12', '# modes of r h / M at r/M = 100; +/- 0.1', '# 50 % of h/home base, t@peak = 0', ...rows]),
  },
  {
    number: 'V29', code: 'formats/hidden-identity', level: 'needs-answer', when: 'the header of a noise curve holds an address',
    raises: () => snr(['# written by ada@example.org', '# user: ada', ...curveRows()]), says: ['Header line 1 of design.txt', 'line 2'], silent: () => snr(['# written by Oxbow-4', ...curveRows()]),
  },
];
