import { describe, expect, it } from 'vitest';
import { fittedQuasiNormal, tabulatedQuasiNormal } from '@/lib/engine/synthesis/quasi-normal';

describe('quasi-normal frequencies', () => {
  it('start at the textbook value without spin', () => {
    const { real, imag } = tabulatedQuasiNormal('22', 0);
    expect(real).toBeCloseTo(0.37367168, 5);
    expect(imag).toBeCloseTo(0.08896232, 5);
  });
  it('agree with continued fractions at spin 0.7 and, between the points, at the spin of an equal-mass remnant', () => {
    const at7 = tabulatedQuasiNormal('22', 0.7);
    expect([at7.real, at7.imag]).toEqual([expect.closeTo(0.5326002, 5), expect.closeTo(0.0807929, 5)]);
    const remnant = tabulatedQuasiNormal('22', 0.68642);
    expect(remnant.real / 0.95161).toBeCloseTo(0.55347, 4);
    expect(remnant.imag / 0.95161).toBeCloseTo(0.08542, 4);
  });
  it('depend on (ℓ, m) only through ℓ when there is no spin', () => {
    expect(tabulatedQuasiNormal('21', 0)).toEqual(tabulatedQuasiNormal('22', 0));
    expect(tabulatedQuasiNormal('32', 0)).toEqual(tabulatedQuasiNormal('33', 0));
  });
  it('by the published fit of (2,2) have F = 0.5349469 and Q = 3.287063 at spin 0.7', () => {
    const { real, imag } = fittedQuasiNormal('22', 0.7);
    expect(real).toBeCloseTo(0.5349469, 6);
    expect(real / (2 * imag)).toBeCloseTo(3.287063, 5);
  });
  it('by fit and by table are within 2.4 % of each other', () => {
    for (const mode of ['22', '21', '33', '44'] as const)
      for (const spin of [0, 0.1, 0.2, 0.3, 0.45, 0.6, 0.7, 0.75, 0.85, 0.9]) {
        const [fit, tab] = [fittedQuasiNormal(mode, spin), tabulatedQuasiNormal(mode, spin)];
        expect(Math.abs(fit.real / tab.real - 1), `${mode} real at ${spin}`).toBeLessThan(0.024);
        expect(Math.abs(fit.imag / tab.imag - 1), `${mode} imag at ${spin}`).toBeLessThan(0.024);
      }
  });
  it('are refused where the table does not reach', () => {
    for (const spin of [-0.5, 0.98, Number.NaN]) expect(() => tabulatedQuasiNormal('22', spin)).toThrow(RangeError);
  });
});
