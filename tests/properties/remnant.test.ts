import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { cycles } from '@/lib/engine/quantities/cycles';
import { eccentricity } from '@/lib/engine/quantities/eccentricity';
import { remnantMass } from '@/lib/engine/quantities/remnant-mass';
import { heavierFirst } from '@/lib/engine/remnant/fit-point';
import { fitObservables, readFits } from '@/lib/engine/remnant/published-fits';
import { binaryOf } from '@/lib/engine/synthesis/binary';
import { evenTimes, gaussian, modeFrom, modeSet, numberBy } from '../golden/energy-signals';

const routes = ['A', 'B'] as const;
const SOME = { numRuns: 25, seed: 11 };
const FEW = { numRuns: 5, seed: 11 };
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const spin = between(-1, 1);

/** What a number of each kind is usually as large as. */
const usual = { mass: 1, spin: 1, 'peak-luminosity': 1e-3, recoil: 100 } as const;

describe('published fits', () => {
  it('are the same by doubles as printed and by decimals in another algebra, for any binary', () => {
    fc.assert(
      fc.property(between(1, 20), spin, spin, (massRatio, chi1z, chi2z) => {
        const binary = binaryOf({ massRatio, chi1z, chi2z });
        for (const observable of fitObservables) {
          const decimals = readFits(observable, binary, 'B');
          readFits(observable, binary, 'A').forEach(({ name, value }, i) => expect(value, `${name} ${observable}`).toAgreeWith(decimals[i]!.value, 1e-12 * usual[observable]));
        }
      }),
      SOME,
    );
  });
  it('do not mind which body is called the first', () => {
    fc.assert(
      fc.property(between(1, 20), spin, spin, (massRatio, chi1z, chi2z) => {
        const one = heavierFirst({ massRatio, chi1z, chi2z });
        const other = heavierFirst({ massRatio: 1 / massRatio, chi1z: chi2z, chi2z: chi1z });
        for (const observable of fitObservables) {
          const exchanged = readFits(observable, other, 'A');
          readFits(observable, one, 'A').forEach(({ value }, i) => expect(value).toAgreeWith(exchanged[i]!.value, 1e-10 * usual[observable]));
        }
      }),
      SOME,
    );
  });
  it('of equal masses do not mind an exchange of spins, and leave no kick for equal ones', () => {
    fc.assert(
      fc.property(spin, spin, (chi1z, chi2z) => {
        const read = (a: number, b: number) => fitObservables.flatMap((observable) => readFits(observable, binaryOf({ massRatio: 1, chi1z: a, chi2z: b }), 'A').map(({ value }) => value / usual[observable]));
        read(chi1z, chi2z).forEach((value, i) => expect(value).toAgreeWith(read(chi2z, chi1z)[i]!, 1e-10));
        expect(readFits('recoil', binaryOf({ massRatio: 1, chi1z, chi2z: chi1z }), 'A')[0]!.value).toAgreeWith(0, 1e-9);
      }),
      SOME,
    );
  });
  it('radiate nothing in the limit of a test particle, and leave the hole its spin', () => {
    for (const route of routes) {
      const light = binaryOf({ massRatio: 1e6, chi1z: 0.3, chi2z: 0 });
      for (const { name, value } of readFits('mass', light, route)) expect(value, name).toAgreeWith(1, 1e-5);
      for (const { name, value } of readFits('spin', light, route)) expect(value, name).toAgreeWith(0.3, 1e-5);
    }
  });
});

describe('a balance', () => {
  const axis = evenTimes(-60, 60, 0.5);
  it('loses by each factor on the amplitude its square in energy', () => {
    const wave = (size: number): Waveform => modeSet(axis, [modeFrom(axis, 2, 2, gaussian(size, 8, 0.5, 0))], 'strain', { admEnergy: 0.99 });
    const gone = 0.99 - numberBy(remnantMass, 'A', wave(0.1));
    fc.assert(
      fc.property(between(0.1, 5), (factor) => {
        for (const route of routes) expect(0.99 - numberBy(remnantMass, route, wave(0.1 * factor))).toAgreeWith(gone * factor ** 2, { relative: 1e-8 });
      }),
      FEW,
    );
  });
});

describe('an inspiral', () => {
  const spiral = (by: number, turn: number, size: number): Waveform => {
    const axis = evenTimes(0, 600, 1);
    return modeSet(axis, [
      modeFrom(axis, 2, 2, (t) => {
        const u = t - by;
        const p = 0.08 * u + 3e-5 * u * u + 0.02 * Math.sin(0.04 * u) + turn;
        return [size * Math.cos(p), -size * Math.sin(p)];
      }),
    ]);
  };
  const inside = (by: number, from: number, to: number) => ({ window: [from + by, to + by] as const });
  it('keeps its cycles and its eccentricity whatever the zero of time, the constant phase and a factor', () => {
    const plain = spiral(0, 0, 0.1);
    const [turns, e] = [numberBy(cycles, 'A', plain, inside(0, 60, 500)), numberBy(eccentricity, 'A', plain, inside(0, 60, 500))];
    fc.assert(
      fc.property(between(-40, 40), between(-3, 3), between(0.01, 50), (by, turn, size) => {
        const moved = spiral(by, turn, size);
        for (const route of routes) {
          expect(numberBy(cycles, route, moved, inside(by, 60, 500))).toAgreeWith(turns, 1e-8);
          expect(numberBy(eccentricity, route, moved, inside(by, 60, 500))).toAgreeWith(e, { relative: 1e-5 });
        }
      }),
      FEW,
    );
  });
  it('has in two windows side by side as many cycles as in both together', () => {
    const plain = spiral(0, 0, 0.1);
    fc.assert(
      fc.property(between(100, 500), (middle) => {
        for (const route of routes) {
          const parts = numberBy(cycles, route, plain, { window: [50, middle] }) + numberBy(cycles, route, plain, { window: [middle, 560] });
          expect(parts).toAgreeWith(numberBy(cycles, route, plain, { window: [50, 560] }), 1e-9);
        }
      }),
      FEW,
    );
  });
});
