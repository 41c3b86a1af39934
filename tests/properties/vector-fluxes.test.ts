import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { peakLuminosity } from '@/lib/engine/quantities/peak-luminosity';
import { radiatedAngularMomentum } from '@/lib/engine/quantities/radiated-angular-momentum';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { recoil } from '@/lib/engine/quantities/recoil';
import { rateOf } from '@/lib/engine/radiation/mode-products';
import { momentumProducts } from '@/lib/engine/radiation/momentum-products';
import { totalsOnSphere } from '@/lib/engine/radiation/momentum-on-sphere';
import { evenTimes, measureOf, modeFrom, modeSet, numberBy } from '../golden/energy-signals';
import { rotatedModes, rotatedVector } from './rotated-modes';
import { seededRandom } from '../support/seeded-random';

const axis = evenTimes(-60, 60, 0.5);

/** Every mode up to ℓ with a burst of its own size, phase and frequency. */
function randomModes(seed: number, lMax: number, t = axis): Mode[] {
  const random = seededRandom(seed);
  const modes: Mode[] = [];
  for (let l = 2; l <= lMax; l++) {
    for (let m = -l; m <= l; m++) {
      const [size, phase, omega] = [0.1 * random(), 2 * Math.PI * random(), 0.3 * (random() - 0.5) + 0.1 * m];
      modes.push(modeFrom(t, l, m, (x) => [size * Math.exp((-x * x) / 200) * Math.cos(omega * x + phase), -size * Math.exp((-x * x) / 200) * Math.sin(omega * x + phase)]));
    }
  }
  return modes;
}

const waveOf = (modes: readonly Mode[]): Waveform => modeSet(axis, modes);
const vectorOf = (quantity: typeof recoil, modes: readonly Mode[], names: readonly string[]): number[] => {
  const { components } = measureOf(quantity, waveOf(modes), quantity === recoil ? { normaliseBy: 'M' } : {}).points[0]!;
  return names.map((name) => components![name]!);
};
const angle = fc.double({ min: 0, max: Math.PI, noNaN: true });
const seed = fc.integer({ min: 1, max: 1e6 });

describe('T4: the momentum of random modes', () => {
  it('is the same from products of modes and from the strain put together over the sphere, to 1e-12', () => {
    fc.assert(fc.property(seed, fc.integer({ min: 2, max: 7 }), (start, lMax) => {
      const modes = randomModes(start, lMax, Float64Array.of(0.7));
      const onSphere = totalsOnSphere(modes, Float64Array.of(1));
      const scale = onSphere.energy;
      expect(modes.reduce((sum, { re, im }) => sum + re[0]! ** 2 + im[0]! ** 2, 0) / (16 * Math.PI) / scale).toAgreeWith(1, 1e-12);
      momentumProducts(modes).forEach((products, k) => expect(rateOf(products, modes, modes, 1)[0]! / scale).toAgreeWith(onSphere.momentum[k]! / scale, 1e-12));
    }), { numRuns: 20, seed: 11 });
  });
});

describe('T6: what is radiated turns as a vector when the field is turned', () => {
  it.each([
    ['angular momentum', radiatedAngularMomentum, ['x', 'y', 'z']],
    ['recoil', recoil, ['vx', 'vy', 'vz']],
  ] as const)('%s', (_, quantity, names) => {
    fc.assert(fc.property(seed, angle, angle, angle, (start, alpha, beta, gamma) => {
      const modes = randomModes(start, 3);
      const before = vectorOf(quantity, modes, names);
      const after = vectorOf(quantity, rotatedModes(modes, alpha, beta, gamma), names);
      const size = Math.hypot(...before);
      rotatedVector(before, alpha, beta, gamma).forEach((x, k) => expect(after[k]! / size).toAgreeWith(x / size, 1e-10));
    }), { numRuns: 8, seed: 5 });
  });

  it('while energy, peak and the length of the recoil stay', () => {
    const modes = randomModes(3, 3);
    const turned = rotatedModes(modes, 0.4, 1.1, 2.2);
    for (const quantity of [radiatedEnergy, peakLuminosity, recoil]) expect(numberBy(quantity, 'A', waveOf(turned)) / numberBy(quantity, 'A', waveOf(modes))).toAgreeWith(1, 1e-9);
  });
});

describe('symmetric systems', () => {
  const upper = randomModes(17, 3).filter(({ m }) => m > 0);

  it('have no recoil along z when m < 0 is the mirror of m > 0, and no angular momentum in the plane', () => {
    const mirrored: Waveform = { ...waveOf(upper), negativeM: 'mirror' };
    const push = measureOf(recoil, mirrored).points[0]!;
    expect(push.components!.vz! / push.value!).toAgreeWith(0, 1e-12);
    const turn = measureOf(radiatedAngularMomentum, mirrored).points[0]!;
    expect(turn.components!.x! / turn.value!).toAgreeWith(0, 1e-12);
    expect(turn.components!.y! / turn.value!).toAgreeWith(0, 1e-12);
  });

  it('have none at all when odd m vanish besides', () => {
    const silent = upper.map((mode) => (mode.m % 2 === 1 ? { ...mode, re: mode.re.map(() => 0), im: mode.im.map(() => 0) } : mode));
    const { value, components, expandedUncertainty } = measureOf(recoil, { ...waveOf(silent), negativeM: 'mirror' }).points[0]!;
    expect(value).toAgreeWith(0, 1e-9);
    expect(components!.directionDeg).toBeNull();
    expect(Number.isFinite(expandedUncertainty)).toBe(true);
  });
});

describe('scaling', () => {
  it('goes with the square of the amplitude, whatever the quantity', () => {
    const modes = randomModes(29, 3);
    const louder = modes.map((mode) => ({ ...mode, re: mode.re.map((x) => 1.5 * x), im: mode.im.map((x) => 1.5 * x) }));
    for (const quantity of [radiatedAngularMomentum, peakLuminosity, recoil]) {
      const settings = quantity === recoil ? ({ normaliseBy: 'M' } as const) : {};
      for (const route of ['A', 'B'] as const) expect(numberBy(quantity, route, waveOf(louder), settings) / numberBy(quantity, route, waveOf(modes), settings)).toAgreeWith(2.25, 1e-9);
    }
  });
});
