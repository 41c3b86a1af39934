/**
 * Electromagnetic: the waves that magnetic fields around a merger emit, and the light of gas around the
 * remnant. Modes of φ₂ (spin weight −1) stand in for Ḣ in the sums of `radiation`, so that an energy is
 * taken by the same two routes; frequencies are those of `ringdown` and `tones`; curves of luminosity are
 * read on local polynomials and on splines. What is computed here is emitted, never observed.
 */
import { C_M_PER_S, G_M3_PER_KG_S2, GMSUN_M3_PER_S2 } from '../units/constants';

/** B̂ = 1 at one solar mass, in gauss: c⁴/(G^{3/2} M☉). Source: settings.md section 7; closed form 2.355962e19. */
export const FIELD_UNIT_GAUSS = 2.35596e19;

/** Eddington luminosity of one solar mass in erg/s: 4πGM m_p c/σ_T. Source: settings.md section 7; closed form 1.257065e38. */
export const EDDINGTON_ERG_PER_S = 1.2571e38;

/** Plasma frequency of one electron in a cubic centimetre, in Hz. Source: settings.md section 7; closed form 8978.7. */
export const PLASMA_HZ = 8980;

/** Rest energy of one solar mass in erg (1.787e54). */
export const MSUN_ERG = (GMSUN_M3_PER_S2 / G_M3_PER_KG_S2) * C_M_PER_S * C_M_PER_S * 1e7;

/** Julian year in s, exact. */
export const YEAR_S = 365.25 * 86400;

/** B̂ = B·M of a field far away and a total mass. */
export const fieldHatOf = (fieldGauss: number, massMsun: number): number => (fieldGauss * massMsun) / FIELD_UNIT_GAUSS;

/** Frequency below which waves do not travel through a plasma of so many electrons in a cubic centimetre. */
export const plasmaCutoffHz = (densityCm3: number): number => PLASMA_HZ * Math.sqrt(densityCm3);
