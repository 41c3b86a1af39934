import { describe, expect, it } from 'vitest';
import { ENERGY_FACTOR } from '@/lib/engine/radiation/energy-on-samples';
import { peakOnPanels, peakOnSamples } from '@/lib/engine/radiation/flux-peak';
import { angularMomentumProducts, momentumProducts } from '@/lib/engine/radiation/momentum-products';
import { houseSamples, radiationOnSamples } from '@/lib/engine/radiation/news-on-samples';
import { radiationOnPanels } from '@/lib/engine/radiation/news-on-panels';
import type { RadiationRecord } from '@/lib/engine/radiation/radiation-record';
import { vectorOnSamples } from '@/lib/engine/radiation/vector-integrals';
import type { Mode } from '@/lib/engine/contract/waveform';
import { evenTimes, gaussian, modeFrom } from '../golden/energy-signals';

/** Halve the step, and measure how much faster the error falls. */
const [large, small, width, omega] = [0.12, 0.03, 9, 0.35];
const recordOf = (step: number, variable: 'strain' | 'news' = 'strain'): RadiationRecord => {
  // The peak lies at the same place between two samples whatever the step.
  const steps = Math.ceil(81 / step);
  const axis = evenTimes((0.3 - steps) * step, (0.3 + steps) * step, step);
  const mode = (l: number, m: number, size: number): Mode => modeFrom(axis, l, m, gaussian(size, width, omega, variable === 'news' ? 1 : 0));
  return { axis, step, variable, modes: [mode(2, 2, large), mode(3, 3, small)] };
};
const order = (errorAt: (step: number) => number, step: number): number => Math.log2(errorAt(step) / errorAt(step / 2));

const K = Math.sqrt(Math.PI) * width * (omega ** 2 + 1 / (2 * width ** 2));
const exactJ = ((2 * large ** 2 + 3 * small ** 2) * omega * Math.sqrt(Math.PI) * width) / (16 * Math.PI);
const exactPz = ((large ** 2 * 2) / 3 + small ** 2 / 2) * (K / (16 * Math.PI));
const exactPeak = (large ** 2 + small ** 2) * omega ** 2 * ENERGY_FACTOR;

describe('differences on the samples', () => {
  it.each([[5, 3.8], [7, 5.7], [9, 7.5]])('through %d samples give an angular momentum and a momentum whose error falls with at least order %d', (stencil, least) => {
    const sampled = (step: number) => radiationOnSamples(recordOf(step), 1, { ...houseSamples, stencil }, true);
    const errorOfJ = (step: number): number => Math.abs(vectorOnSamples(angularMomentumProducts(recordOf(step).modes), sampled(step), -1e3, 8)[2] - exactJ);
    const errorOfP = (step: number): number => Math.abs(vectorOnSamples(momentumProducts(recordOf(step).modes), { ...sampled(step), strain: null }, -1e3, 8)[2] - exactPz);
    expect(order(errorOfJ, 1.5)).toBeGreaterThan(least);
    expect(order(errorOfP, 1.5)).toBeGreaterThan(least);
  });
});

describe('the peak of a flux', () => {
  it.each([[6, 5.3], [8, 7]] as const)('on the polynomial of order %d through the samples falls with at least order %d', (points, least) => {
    const errorAt = (step: number): number => Math.abs(peakOnSamples(radiationOnSamples(recordOf(step, 'news'), 1, houseSamples, false), -1e3, points).flux - exactPeak);
    expect(order(errorAt, 3)).toBeGreaterThan(least);
  });

  it('on splines of the strain falls with at least order 6', () => {
    const errorAt = (step: number): number => {
      const record = recordOf(step);
      return Math.abs(peakOnPanels(radiationOnPanels(record, -1e3, 1, false), -1e3, record.axis).flux - exactPeak);
    };
    expect(order(errorAt, 2)).toBeGreaterThan(6);
  });
});
