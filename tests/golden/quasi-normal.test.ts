import { describe, expect, it } from 'vitest';
import { fittedQuasiNormal, tabulatedModes, tabulatedQuasiNormal } from '@/lib/engine/remnant/quasi-normal';
import { kerrFromTone } from '@/lib/engine/remnant/ringdown-inversion';
import { goldenChecks } from './golden-check';
import { kerrTones } from './kerr-continued-fractions';

const printed = [0, 0.1, 0.3, 0.5, 0.6, 0.7, 0.8, 0.9, 0.95];
/** Half a unit of the fifth decimal. */
const HALF = 0.51e-5;
const grid = (from: number, to: number): number[] => Array.from({ length: 16 }, (_, i) => from + (i * (to - from)) / 15);
const largest = (mode: (typeof tabulatedModes)[number], spins: readonly number[]): number => {
  const exact = kerrTones(Number(mode[0]), Number(mode[1]), spins);
  return Math.max(...spins.flatMap((spin, i) => {
    const { real, imag } = tabulatedQuasiNormal(mode, spin);
    return [Math.abs(real - exact[i]!.real), Math.abs(imag - exact[i]!.imag)];
  }));
};

describe.each(tabulatedModes)('T14, mode %s (required: published; Leaver 1985, by two continued fractions solved in the tests)', (mode) => {
  it('has every printed digit of the table', () => expect(largest(mode, printed)).toBeLessThan(HALF));
  it('is interpolated to 1.5e-5 between the printed spins', () => expect(largest(mode, grid(0.001, 0.949))).toBeLessThan(1.5e-5));
  it('reaches 2e-4 beyond them', () => {
    expect(largest(mode, grid(0, -0.2))).toBeLessThan(2e-4);
    expect(largest(mode, grid(0.95, 0.97))).toBeLessThan(2e-4);
  });
});

describe('a hole that rings', () => {
  const spins = [0.1, 0.45, 0.68644, 0.9];
  it.each(['A', 'B'] as const)('is found again from its exact tone by route %s, to 4e-5 where the tone still tells spins apart', (route) => {
    kerrTones(2, 2, spins).forEach(({ real, imag }, i) => {
      const found = kerrFromTone('22', { omega: real / 0.9516, gamma: imag / 0.9516 }, route);
      expect(found?.spin).toAgreeWith(spins[i]!, spins[i]! < 0.4 ? 2e-4 : 4e-5);
      expect(found?.mass).toAgreeWith(0.9516, 5e-5);
    });
  });
  it('is not made up where none rings so', () => {
    for (const route of ['A', 'B'] as const) {
      expect(kerrFromTone('22', { omega: 0.5, gamma: 0.4 }, route)).toBeNull();
      expect(kerrFromTone('22', { omega: 0.5, gamma: -0.08 }, route)).toBeNull();
    }
  });
});

const leaver = 'Leaver 1985; Berti, Cardoso & Starinets 2009, arXiv:0905.2975';
const continued = 'continued fractions of Leaver 1985 solved in mpmath by a separate script';
goldenChecks([
  { id: 'D7', what: 'Mω_R of a Schwarzschild hole, ℓ = 2, by the solver of these tests', required: 'published', source: leaver, value: 0.37367168441804, relative: 1e-12, compute: () => kerrTones(2, 2, [0])[0]!.real },
  { id: 'D7', what: 'its Mω_I', required: 'published', source: leaver, value: 0.08896231568894, relative: 1e-12, compute: () => kerrTones(2, 2, [0])[0]!.imag },
  { id: 'D7', what: 'Mω_R by the engine', required: 'published', source: leaver, value: 0.37367168441804, relative: 1e-5, compute: () => tabulatedQuasiNormal('22', 0).real },
  { id: 'D8', what: 'Mω_R at a = 0.7 by the engine', required: 'from memory', source: 'Berti, Cardoso & Will 2006, gr-qc/0512160, tables', value: 0.5326002, relative: 1e-5, compute: () => tabulatedQuasiNormal('22', 0.7).real },
  { id: 'D8', what: 'its Mω_I', required: 'from memory', source: 'Berti, Cardoso & Will 2006, gr-qc/0512160, tables', value: 0.0807929, relative: 6e-5, compute: () => tabulatedQuasiNormal('22', 0.7).imag },
  { id: 'D9', what: 'the published fit of (2,2) at 0.7', required: 'from memory', source: 'Berti, Cardoso & Will 2006, Table VIII', value: 0.5349469, relative: 1e-6, compute: () => fittedQuasiNormal('22', 0.7).real },
  { id: 'D9', what: 'its quality', required: 'from memory', source: 'Berti, Cardoso & Will 2006, Table VIII', value: 3.287063, relative: 1e-6, compute: () => fittedQuasiNormal('22', 0.7).real / (2 * fittedQuasiNormal('22', 0.7).imag) },
  { id: 'G6', what: 'M_f ω at 0.68644 for the open simulation', required: 'independent derivation', source: continued, value: 0.526694, relative: 2e-5, compute: () => tabulatedQuasiNormal('22', 0.68644).real },
  { id: 'G6', what: 'M_f/τ there', required: 'independent derivation', source: continued, value: 0.081289, relative: 1e-4, compute: () => tabulatedQuasiNormal('22', 0.68644).imag },
  { id: 'appendix D', what: 'Mω₂₂ of the remnant of equal masses', required: 'independent derivation', source: `${continued}, over M_f = 0.95161`, value: 0.55347, relative: 1e-5, compute: () => tabulatedQuasiNormal('22', 0.68642).real / 0.95161 },
  { id: 'appendix D', what: 'its decay', required: 'independent derivation', source: `${continued}, over M_f = 0.95161`, value: 0.08542, relative: 1e-4, compute: () => tabulatedQuasiNormal('22', 0.68642).imag / 0.95161 },
]);
