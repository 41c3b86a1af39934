import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { bandOf, timeSide, white } from '../golden/signals';

const S0 = 1e-46;

/** In white noise, over a band that holds all of a signal, SNR² is 2/S ∫h² dt: T12, by a sum that knows no transform. */
describe.each([routeA, routeB])('Parseval by route $name', (route) => {
  it('ties the loudness in the band to the power in time', () => {
    const band = bandOf(white, 1, 1000);
    fc.assert(fc.property(fc.double({ min: 120, max: 300, noNaN: true }), fc.double({ min: 1e-2, max: 1.8e-2, noNaN: true }), (f0, width) => {
      const rate = 4096;
      const h = (t: number): number => 1e-21 * Math.exp((-t * t) / (2 * width * width)) * Math.cos(2 * Math.PI * f0 * t);
      const side = timeSide(-0.2, 0.2, rate, (t) => ({ plus: h(t), cross: 0 }));
      let power = 0;
      for (let i = 0; i <= 0.4 * rate; i++) power += h(-0.2 + i / rate) ** 2 / rate;
      expect(route.gram(side, band).plusPlus / ((2 * power) / S0)).toBeCloseTo(1, 8);
    }), { numRuns: 15, seed: 7 });
  });
});
