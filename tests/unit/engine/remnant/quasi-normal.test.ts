import { describe, expect, it } from 'vitest';
import { fittedQuasiNormal, tabulatedQuasiNormal } from '@/lib/engine/remnant/quasi-normal';

describe('quasi-normal frequencies', () => {
  it('start at the textbook value without spin', () => {
    const { real, imag } = tabulatedQuasiNormal('22', 0);
    expect(real).toBeCloseTo(0.37367168, 5);
    expect(imag).toBeCloseTo(0.08896232, 5);
  });
  it('depend on (ℓ, m) only through ℓ when there is no spin', () => {
    expect(tabulatedQuasiNormal('21', 0)).toEqual(tabulatedQuasiNormal('22', 0));
    expect(tabulatedQuasiNormal('32', 0)).toEqual(tabulatedQuasiNormal('33', 0));
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
