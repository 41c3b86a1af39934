import { describe } from 'vitest';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { goldenChecks, type GoldenCheck } from './golden-check';

type Row = readonly [id: string, source: string, points: readonly (readonly [fHz: number, value: number])[], relative: number];

const powerDensity = (id: string, fHz: number): number => builtInCurve(id)?.psd(fHz) ?? Number.NaN;

const checksOf = (rows: readonly Row[], quantity: string, of: (psd: number) => number): GoldenCheck[] =>
  rows.flatMap(([id, source, points, relative]) =>
    points.map(([fHz, value]) => ({
      id,
      what: `${quantity} at ${fHz} Hz`,
      required: 'published' as const,
      source,
      value,
      relative,
      compute: () => of(powerDensity(id, fHz)),
    })),
  );

describe('published noise curves, power density', () => {
  goldenChecks(
    checksOf(
      [
        [
          'A1',
          'PRD 63 044023 Table IV, coefficients read in public source text',
          [
            [60, 9.5724766e-45],
            [150, 9e-46],
            [500, 3.668623664e-45],
          ],
          1e-8,
        ],
        [
          'A2',
          'PRD 71 084008, coefficients read in public source text',
          [
            [30, 3.326472265e-46],
            [215, 3.3e-48],
            [1000, 2.004036193e-46],
          ],
          1e-9,
        ],
        [
          'A3',
          'arXiv:1202.4031 Eq. (6), as quoted in public source text',
          [
            [20, 5.599751361e-45],
            [100, 2.111232864e-47],
            [1000, 3.495040221e-46],
          ],
          1e-9,
        ],
        [
          'A4',
          'PRD 82 064010, coefficients read in public source text',
          [
            [10, 2.609766695e-47],
            [100, 6.340324e-50],
            [1000, 4.207599003e-49],
          ],
          1e-9,
        ],
        [
          'A5',
          'arXiv:1803.01944 Eqs. (1), (9)–(11), (13), constants read in the authors’ source text',
          [
            [0.001, 1.636064126e-38],
            [0.01, 1.449359461e-40],
            [0.1, 2.149207558e-39],
          ],
          1e-9,
        ],
      ],
      'S(f) in 1/Hz',
      (psd) => psd,
    ),
  );
});

/** Curves that are not built in come as tables: between their points the engine's rule (ln S linear in ln f) must give the form they were taken from. */
function fromTable(psd: (f: number) => number, fHz: number): number {
  const f = Float64Array.from({ length: 100_001 }, (_, i) => 12 * 200 ** (i / 100_000));
  const read = tabulatedCurve({ name: 'closed form', f, values: f.map(psd), meaning: 'psd', sided: 'one' });
  return read.ok ? read.value.curve.psd(fHz) : Number.NaN;
}
const cutlerFlanagan = (f: number): number => 3e-48 * ((70 / f) ** 4 + 2 * (1 + (f / 70) ** 2));
const firstRun = (f: number): number => (1e-22 * (18 / (0.1 + f)) ** 2) ** 2 + 0.7e-23 ** 2 + ((4e-23 * f) / 2000) ** 2;
const tables: readonly (readonly [id: string, psd: (f: number) => number, required: GoldenCheck['required'], source: string, points: readonly (readonly [number, number])[]])[] = [
  ['A6', cutlerFlanagan, 'from memory', 'Cutler & Flanagan 1994, PRD 49 2658, Eq. (2.1)', [[20, 4.566772959e-46], [70, 1.5e-47], [300, 1.162129742e-46]]],
  ['A7', firstRun, 'published', 'form in the event tutorial of the open science centre', [[50, 2.166245989e-46], [100, 6.345571437e-47], [1000, 4.490010493e-46]]],
];
describe('published noise curves that come as tables', () => {
  goldenChecks(tables.flatMap(([id, psd, required, source, points]) => points.map(([fHz, value]) => ({ id, what: `S(f) in 1/Hz at ${fHz} Hz`, required, source, value, relative: 1e-9, compute: () => fromTable(psd, fHz) }))));
});

describe('published noise curves, amplitude density', () => {
  // The design reference prints four digits: half a unit of the last one is the tolerance.
  goldenChecks(
    checksOf(
      [
        [
          'G2',
          'PRD 84 084037, coefficients read in public source text',
          [
            [20, 1.901e-23],
            [100, 3.97e-24],
            [1000, 5.386e-24],
          ],
          2.7e-4,
        ],
        ['G1', 'first-generation requirement, coefficients read in public source text', [[100, 4.162e-23]], 1.3e-4],
        ['G1b', 'PRD 63 044023, coefficients read in public source text', [[100, 5.456e-23]], 1e-4],
        [
          'SB',
          'arXiv:1803.01944, read in public source text',
          [
            [1e-4, 4.6e-17],
            [1e-3, 1.278e-19],
            [1e-2, 1.201e-20],
          ],
          1.2e-3,
        ],
      ],
      '√S(f) in Hz^-1/2',
      Math.sqrt,
    ),
  );
});
