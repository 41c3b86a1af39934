import { describe, expect, it } from 'vitest';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { houseCosmology, luminosityDistanceMpc, redshiftAt, timeDilatedVolumeMpc3 } from '@/lib/engine/units/cosmology';

interface Golden {
  readonly what: string;
  readonly required: 'published' | 'from memory' | 'common practice';
  readonly source: string;
  readonly value: number;
  readonly relative: number;
  readonly compute: () => number;
}

const empty = { h0: 70, omegaM: 1 };
const golden: readonly Golden[] = [
  {
    what: 'a solar mass in seconds',
    required: 'published',
    source: 'IAU 2015 Resolution B3 and the SI',
    value: 4.925490947641e-6,
    relative: 1e-12,
    compute: () => MSUN_S,
  },
  {
    what: 'a solar mass over a megaparsec',
    required: 'published',
    source: 'IAU 2015 Resolutions B2, B3: 1.476625 km',
    value: 1476.625 / 3.0856775814913673e22,
    relative: 5e-8,
    compute: () => MSUN_PER_MPC,
  },
  {
    what: 'D_L(1) without a cosmological constant',
    required: 'published',
    source: 'closed form (2c/H₀)(1+z)(1 − 1/√(1+z)) (T7)',
    value: ((2 * 299792.458) / 70) * 2 * (1 - Math.SQRT1_2),
    relative: 1e-13,
    compute: () => luminosityDistanceMpc(1, empty),
  },
  {
    what: 'the same far out',
    required: 'published',
    source: 'closed form',
    value: ((2 * 299792.458) / 70) * 51 * (1 - 1 / Math.sqrt(51)),
    relative: 1e-12,
    compute: () => luminosityDistanceMpc(50, empty),
  },
  {
    what: 'D_L(0.2), house expansion',
    required: 'from memory',
    source: 'domain reference Q08, computed there',
    value: 1015.6,
    relative: 5e-5,
    compute: () => luminosityDistanceMpc(0.2, houseCosmology),
  },
  {
    what: 'D_L(0.2), H₀ = 70, Ω_m = 0.3',
    required: 'from memory',
    source: 'domain reference Q08, computed there',
    value: 980.1,
    relative: 5e-5,
    compute: () => luminosityDistanceMpc(0.2, { h0: 70, omegaM: 0.3 }),
  },
  {
    what: 'D_L(1.142), house expansion',
    required: 'from memory',
    source: 'domain reference Q08, computed there',
    value: 8011,
    relative: 2e-4,
    compute: () => luminosityDistanceMpc(1.142, houseCosmology),
  },
];

describe('units and expansion', () => {
  it.each(golden)('$what ($required: $source)', ({ value, relative, compute }) => {
    expect(compute()).toAgreeWith(value, { relative });
  });

  it('a redshift and its distance are each other’s inverse', () => {
    for (const z of [0.001, 0.3, 2, 30])
      expect(redshiftAt(luminosityDistanceMpc(z, houseCosmology), houseCosmology)).toAgreeWith(z, { relative: 1e-12 });
  });

  it('the comoving volume grows by shells divided by 1 + z', () => {
    // Without a cosmological constant D_c = (2c/H₀)(1 − 1/√(1+z)), and the integral is elementary in s = 1/√(1+z).
    const hubble = 299792.458 / 70;
    let sum = 0;
    const n = 20000;
    for (let i = 0; i < n; i++) {
      const z = (1.5 * (i + 0.5)) / n;
      const distance = 2 * hubble * (1 - 1 / Math.sqrt(1 + z));
      sum += ((4 * Math.PI * distance ** 2 * hubble) / (1 + z) ** 2.5) * (1.5 / n);
    }
    expect(timeDilatedVolumeMpc3(1.5, empty)).toAgreeWith(sum, { relative: 1e-8 });
  });
});
