import { describe, expect, it } from 'vitest';
import { EDDINGTON_ERG_PER_S, FIELD_UNIT_GAUSS, fieldHatOf, MSUN_ERG, PLASMA_HZ, plasmaCutoffHz } from '@/lib/engine/electromagnetic/em-units';
import { emEnergy } from '@/lib/engine/quantities/em-energy';
import { emFrequency } from '@/lib/engine/quantities/em-frequency';
import { MSUN_M } from '@/lib/engine/units/constants';
import { bothRoutes, measureOfRoles, phi2Set, ringing, ringTimes } from './electromagnetic-signals';
import { evenTimes, gaussian, modeFrom, modeSet } from './energy-signals';
import { goldenChecks } from './golden-check';

describe('units of fields, plasmas and light', () => {
  goldenChecks([
    { id: 'F5', what: 'rest energy of one solar mass in erg', required: 'published', source: 'closed form, IAU 2015 B3 and CODATA 2018', value: 1.78708e54, relative: 1e-5, compute: () => MSUN_ERG },
    { id: 'E1', what: 'one gauss in 1/cm', required: 'published', source: 'closed form √G/c², Gaussian, CODATA 2018', value: 2.8745e-25, relative: 1e-4, compute: () => fieldHatOf(1, 1) / (100 * MSUN_M) },
    { id: 'E6', what: 'three solar masses in supernovae of 10⁵¹ erg', required: 'from memory', source: 'closed form; scale of one supernova from memory', value: 5361.2, relative: 1e-3, compute: () => (3 * MSUN_ERG) / 1e51 },
    { id: 'E2', what: 'B·M of 10⁴ G at 10⁸ M☉', required: 'published', source: 'closed form B√G/c²·GM/c², Gaussian', value: 4.244550295942593e-8, relative: 2e-6, compute: () => fieldHatOf(1e4, 1e8) },
    { id: 'E3', what: 'field unit c⁴/(G^1.5 M☉) in G', required: 'published', source: 'closed form, CODATA 2018', value: 2.35596218745696e19, relative: 2e-6, compute: () => FIELD_UNIT_GAUSS },
    { id: 'E4', what: 'Eddington luminosity of 1 M☉ in erg/s', required: 'from memory', source: '4πGMm_p c/σ_T, CODATA 2018', value: 1.2570651798467908e38, relative: 5e-5, compute: () => EDDINGTON_ERG_PER_S },
    { id: 'plasma', what: 'plasma frequency of one electron a cm³ in Hz', required: 'published', source: 'closed form √(e²/πm), CODATA 2018 in Gaussian units', value: Math.sqrt(4.803204712570263e-10 ** 2 / (Math.PI * 9.1093837015e-28)), relative: 2e-4, compute: () => PLASMA_HZ },
    { id: 'Q25', what: 'cut-off between the stars in Hz', required: 'published', source: 'design reference Q25: 1.56 kHz at 0.03 a cm³', value: 1560, relative: 4e-3, compute: () => plasmaCutoffHz(0.03) },
    { id: 'Q24', what: 'energy of 0.56 B̂² M at 10⁴ G and 10⁸ M☉ in erg', required: 'published', source: 'design reference Q24: 1.8×10⁴⁷', value: 1.8e47, relative: 5e-3, compute: () => 0.56 * fieldHatOf(1e4, 1e8) ** 2 * 1e8 * MSUN_ERG },
  ]);
});

/** Required: ∫A²e^{−t²/s²} dt = A²s√π in closed form; L = (1/4π)Σ|rφ₂|², 1/2π for the Kinnersley tetrad. */
describe('the energy of a burst of φ₂', () => {
  const axis = evenTimes(-120, 120, 0.5);
  const [size, width] = [3e-8, 9];
  const modes = [modeFrom(axis, 2, 2, gaussian(size, width, 0.4, 0)), modeFrom(axis, 1, 0, gaussian(2 * size, width, 0, 0))];
  const closed = (5 * size * size * width * Math.sqrt(Math.PI)) / (4 * Math.PI);
  it.each([['symmetric', 1], ['kinnersley', 2], [undefined, 1]] as const)('is that of its closed form by both routes (tetrad %s)', (tetrad, factor) => {
    const wave = phi2Set(axis, modes, tetrad === undefined ? {} : { tetrad });
    for (const value of bothRoutes(measureOfRoles(emEnergy, { a: wave }))) expect(value).toAgreeWith(factor * closed, { relative: 1e-11 });
  });
  it('is that of its closed form on uneven samples, and from a start between them', () => {
    const warped = Float64Array.from({ length: 700 }, (_, i) => -110 + 0.32 * i + 2 * Math.sin(i / 25));
    const wave = phi2Set(warped, [modeFrom(warped, 2, 2, gaussian(size, width, 0.4, 0))]);
    for (const value of bothRoutes(measureOfRoles(emEnergy, { a: wave }, { startM: 0.0375 }))) {
      // Half of it, less the first 0.0375 M, at whose middle the curve is 1 to 1e-6.
      expect(value).toAgreeWith((size * size * (width * Math.sqrt(Math.PI) - 2 * 0.0375)) / (8 * Math.PI), { relative: 1e-6 });
    }
  });
});

/** Required: published — abstract of arXiv:0912.2330: 10⁻¹⁵ (M/10⁸ M☉)² (B/10⁴ G)² of the mass; the power of l = 1 is 8πS₀/3 in closed form. */
describe('published powers of fields', () => {
  const axis = evenTimes(0, 200, 0.5);
  it('E5: go with the square of the field: 10⁻¹⁵ at 10⁴ G is 10⁻¹¹ at 10⁶ G, a hundred times more for a field ten times stronger', () => {
    const bare = phi2Set(axis, [modeFrom(axis, 2, 2, (t) => gaussian(1, 9, 0.4, 0)(t - 100))], { ownTotalMassMsun: 1e8, binary: { fieldGauss: 1e4 } });
    const unit = measureOfRoles(emEnergy, { a: bare }).points[0]!.value!;
    const size = Math.sqrt(1e-15 / unit);
    const a = phi2Set(axis, [modeFrom(axis, 2, 2, (t) => gaussian(size, 9, 0.4, 0)(t - 100))], { ownTotalMassMsun: 1e8, binary: { fieldGauss: 1e4 } });
    const at = (fieldGauss: number): (number | null)[] => bothRoutes(measureOfRoles(emEnergy, { a }, { fieldGauss, totalMassMsun: 1e8 }));
    at(1e6).forEach((value, i) => {
      expect(value).toAgreeWith(1e-11, { relative: 1e-9 });
      expect(value! / at(1e5)[i]!).toAgreeWith(100, { relative: 1e-9 });
    });
  });
  it('E7: a flux S₀ sin²θ of an l = 1 wave carries 8πS₀/3', () => {
    // |⁻¹Y₁₀|² = 3 sin²θ/8π, so that |rφ₂|² |⁻¹Y₁₀|²/4π = sin²θ.
    const size = Math.sqrt(4 * Math.PI * ((8 * Math.PI) / 3));
    const a = phi2Set(axis, [modeFrom(axis, 1, 0, () => [size, 0])]);
    for (const value of bothRoutes(measureOfRoles(emEnergy, { a }))) expect(value! / 200).toAgreeWith((8 * Math.PI) / 3, { relative: 1e-9 });
  });
});

/** Required: f = Mω/2π · c³/GM in closed form; M_max where it meets the cut-off. */
describe('the frequency of a ring of Mω = 0.55', () => {
  const closed = 0.55 / (2 * Math.PI * 1e8 * 4.925490947641267e-6);
  it('is 1.777×10⁻⁴ Hz at 10⁸ M☉ by both routes, from ψ₄ read as a strain and from φ₂', () => {
    for (const a of [modeSet(ringTimes, [ringing()]), phi2Set(ringTimes, [ringing()])]) {
      const measured = measureOfRoles(emFrequency, { a }, { totalMassMsun: 1e8 });
      for (const value of bothRoutes(measured)) expect(value).toAgreeWith(closed, { relative: 1e-8 });
      const { cutoffHz, ratio, massLimitMsun } = measured.points[0]!.components!;
      expect(cutoffHz).toAgreeWith(8980 * Math.sqrt(0.03), { relative: 1e-12 });
      expect(ratio).toAgreeWith(closed / (8980 * Math.sqrt(0.03)), { relative: 1e-8 });
      expect(massLimitMsun).toAgreeWith(0.55 / (2 * Math.PI * 4.925490947641267e-6 * 8980 * Math.sqrt(0.03)), { relative: 1e-8 });
    }
  });
});
