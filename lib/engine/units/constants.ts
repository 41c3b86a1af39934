/**
 * Units: the few physical constants by which a waveform in units of its mass becomes a strain in
 * seconds (rule 2.6), and the expanding-universe distances. Everything else in the workshop is
 * dimensionless or says its unit in its name.
 */

/** Speed of light in m/s. Source: SI definition, exact. */
export const C_M_PER_S = 299792458;

/** Nominal solar mass parameter GM☉ in m³/s². Source: IAU 2015 Resolution B3, exact by convention. */
export const GMSUN_M3_PER_S2 = 1.3271244e20;

/** One megaparsec in m. Source: IAU 2015 Resolution B2 (648 000/π au) with the exact au of IAU 2012 B2. */
export const MPC_M = 3.0856775814913673e22;

/** One solar mass as a time, GM☉/c³ in s (4.925490947641e-6). */
export const MSUN_S = GMSUN_M3_PER_S2 / (C_M_PER_S * C_M_PER_S * C_M_PER_S);

/** One solar mass as a length, GM☉/c² in m. */
export const MSUN_M = GMSUN_M3_PER_S2 / (C_M_PER_S * C_M_PER_S);

/** One solar mass over one megaparsec: the strain of r h/M = 1 at 1 M☉ and 1 Mpc. */
export const MSUN_PER_MPC = MSUN_M / MPC_M;

/** Speed of light in km/s, for c/H₀. */
export const C_KM_PER_S = C_M_PER_S / 1000;

/** Newton's constant in m³/(kg s²). Source: CODATA 2018 and 2022, relative uncertainty 2.2e-5. */
export const G_M3_PER_KG_S2 = 6.6743e-11;

/** c⁵/G in erg/s: the luminosity of which a flux in units of the mass is a fraction (3.62825e59). */
export const LUMINOSITY_ERG_PER_S = (C_M_PER_S ** 5 / G_M3_PER_KG_S2) * 1e7;
