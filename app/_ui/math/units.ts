/** Units as the sheet writes them, as they are printed, and as they are read aloud. */
interface Spoken {
  readonly print: string;
  readonly say: string;
}
const known: Record<string, Spoken> = {
  Msun: { print: 'M⊙', say: 'solar masses' },
  M: { print: 'M', say: 'total masses' },
  rad: { print: 'rad', say: 'radians' },
  Hz: { print: 'Hz', say: 'hertz' },
  Mpc: { print: 'Mpc', say: 'megaparsecs' },
  s: { print: 's', say: 'seconds' },
  deg: { print: '°', say: 'degrees' },
  'km/s': { print: 'km/s', say: 'kilometres a second' },
  'Hz^-1/2': { print: 'Hz⁻¹ᐟ²', say: 'per root hertz' },
  '1/Hz': { print: 'Hz⁻¹', say: 'per hertz' },
  'M^2': { print: 'M²', say: 'total masses squared' },
  'rad/M': { print: 'rad/M', say: 'radians a total mass' },
  erg: { print: 'erg', say: 'ergs' },
  'erg/s': { print: 'erg/s', say: 'ergs a second' },
  G: { print: 'G', say: 'gauss' },
  'cm^-3': { print: 'cm⁻³', say: 'per cubic centimetre' },
  'Msun/yr': { print: 'M⊙/yr', say: 'solar masses a year' },
  'c^5/G': { print: 'c⁵/G', say: 'c to the fifth over G' },
};
const aliases: Record<string, string> = { 'M²': 'M^2', 'c⁵/G': 'c^5/G', 'M☉': 'Msun', 'M⊙': 'Msun', M_sun: 'Msun', 'cm⁻³': 'cm^-3', 'M☉/yr': 'Msun/yr', '1/sqrt(Hz)': 'Hz^-1/2', 'Hz^-0.5': 'Hz^-1/2', 'Hz^−1/2': 'Hz^-1/2', '1': '', dimensionless: '' };

export const unitKey = (unit: string): string => aliases[unit] ?? unit;
export const unitText = (unit: string): string => known[unitKey(unit)]?.print ?? unitKey(unit);
export const unitSpoken = (unit: string): string => known[unitKey(unit)]?.say ?? unitKey(unit);
