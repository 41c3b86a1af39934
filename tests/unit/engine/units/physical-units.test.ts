import { describe, expect, it } from 'vitest';
import type { MeasureRequest, Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Variable, Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { cycles } from '@/lib/engine/quantities/cycles';
import { horizonRedshift } from '@/lib/engine/quantities/horizon-redshift';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { snr } from '@/lib/engine/quantities/snr';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { swellAndRing } from '@/tests/golden/tone-signals';
import { evenTimes, modeFrom, modeSet } from '@/tests/golden/energy-signals';

/** A phase of what was integrated twice: rounding of the times in seconds grows in it. */
const TWICE_INTEGRATED = 2e-11;
const MASS = 60;
const DISTANCE = 400;
const ORDER = { strain: 0, news: 1, psi4: 2 } as const;
const axis = evenTimes(-300, 120, 0.5);
const geometric = (variable: Variable): Waveform => {
  const of22 = modeFrom(axis, 2, 2, swellAndRing(0.3, 0.4, 0.05, 20));
  return { ...modeSet(axis, [of22, { l: 2, m: -2, re: of22.re, im: of22.im.map((x) => -x) }]), name: 'A', variable };
};

function times(given: Waveform, seconds: number, by: number, facts: Partial<Waveform>): Waveform {
  const modes = given.content.kind === 'modes' ? given.content.modes.map((mode): Mode => ({ ...mode, re: mode.re.map((x) => x * by), im: mode.im.map((x) => x * by) })) : [];
  return { ...given, unit: 's', axis: given.axis.map((t) => t * seconds), uniformStep: given.uniformStep! * seconds, content: { kind: 'modes', modes }, ownTotalMassMsun: MASS, ...facts };
}

const seconds = MASS * MSUN_S;
/** ḣ in 1/s and ψ₄ in 1/s², as a detector at that distance has them. */
const physical = (variable: keyof typeof ORDER): Waveform => times(geometric(variable), seconds, (MASS * MSUN_PER_MPC) / DISTANCE / seconds ** ORDER[variable], { amplitudeUnit: 'strain', ownDistanceMpc: DISTANCE });
const noise = builtInCurve('G2')!;

function both(quantity: Quantity, a: Waveform, settings: DeclaredSettings): readonly number[] {
  const request: MeasureRequest = { claimId: 'C', inputs: { of: { a }, noise: quantity.needsNoise ? noise : null }, settings, over: null, claimed: [null], withFigures: false };
  const { A, B } = quantity.measure(request, { onProgress: () => undefined, cancelled: () => false }).points[0]!.routes;
  return [A ?? Number.NaN, B ?? Number.NaN];
}

const asked: readonly (readonly [Quantity, DeclaredSettings])[] = [
  [snr, { totalMassMsun: 90, distanceMpc: 700, fLowHz: 30 }],
  [horizonRedshift, { totalMassMsun: 90, fLowHz: 30 }],
  [radiatedEnergy, {}],
  [cycles, { window: [-200, -20] }],
];

describe('the same data in physical and in geometric units give the same number by both routes', () => {
  it.each(['strain', 'news', 'psi4'] as const)('%s in 1/s to its order', (variable) => {
    for (const [quantity, settings] of asked) {
      const expected = both(quantity, geometric(variable), settings);
      both(quantity, physical(variable), settings).forEach((value, i) => expect(value).toAgreeWith(expected[i]!, { relative: quantity === cycles && variable === 'psi4' ? TWICE_INTEGRATED : 1e-12 }));
    }
  });
  it('strain in rh/M against seconds, with the mass alone', () => {
    for (const [quantity, settings] of asked) {
      const expected = both(quantity, geometric('strain'), settings);
      both(quantity, times(geometric('strain'), seconds, 1, {}), settings).forEach((value, i) => expect(value).toAgreeWith(expected[i]!, { relative: 1e-12 }));
    }
  });
});
