import { z } from 'zod';

/**
 * The words of `counterfoil-claim/1` as zod schemas. Each message says what was expected: together
 * with the value that was seen it makes the refusal. What depends on more than one word of the
 * sheet is judged in the files beside this one.
 */
export const claimFormat = 'counterfoil-claim/1';

export const text = (most: number, what = `text of at most ${most} characters`) => z.string({ error: what }).max(most, { error: what });
export const finite = (what: string) => z.number({ error: what });
const positive = (what: string) => finite(what).positive({ error: what });
export const oneOf = <const T extends readonly [string, ...string[]]>(options: T) => z.enum(options, { error: `one of ${options.map((o) => `"${o}"`).join(', ')}` });

export const nameRule = 'a name of 1 to 80 printable characters';
export const isName = (name: string): boolean => /^[^\p{C}]{1,80}$/u.test(name) && name.trim() === name && name !== '__proto__';

const modeIndex = (what = 'a mode as [l, m]') => z.tuple([z.int({ error: what }), z.int({ error: what })], { error: what });
const path = text(300, 'a relative path');
const columns = z.array(text(40, 'the name of a column'), { error: 'a list of column names' }).min(2, { error: 'at least two columns' }).max(4000, { error: 'at most 4000 columns' });

export const binarySchema = z.strictObject({
  massRatio: positive('a mass ratio above zero').optional(),
  chi1z: finite('a number').optional(),
  chi2z: finite('a number').optional(),
  admEnergy: positive('an energy in M above zero').optional(),
  admAngularMomentum: finite('a number in M²').optional(),
  remnantMass: positive('a mass in M above zero').optional(),
  remnantSpin: finite('a number').optional(),
  eccentricity: finite('a number from 0 to 1').min(0, { error: 'a number from 0 to 1' }).lt(1, { error: 'a number from 0 to 1' }).optional(),
  fieldGauss: positive('a field in gauss above zero').optional(),
}, { error: 'an object of facts about the binary' });

const evenAxis = z.strictObject({ start: finite('where the axis begins'), step: positive('a step above zero') });

export const waveformSchema = z.strictObject({
  file: path.optional(),
  files: z.record(z.string(), path, { error: 'an object such as {"2,2": "l2_m2.txt"}' }).optional(),
  datasets: z.record(z.string(), z.string(), { error: 'an object such as {"2,2": "/path"}' }).optional(),
  time: z.union([text(300), evenAxis], { error: 'the path of a dataset, or even steps such as {"start": 0, "step": 0.1}' }).optional(),
  format: oneOf(['text', 'npy', 'npz', 'hdf5']).optional(),
  domain: oneOf(['time', 'frequency']).optional(),
  variable: oneOf(['strain', 'news', 'psi4', 'phi2', 'luminosity']).optional(),
  columns: columns.optional(),
  mode: modeIndex().optional(),
  timeUnit: oneOf(['M', 's', '1/M', 'Hz']).optional(),
  amplitudeUnit: oneOf(['rh/M', 'strain', 'geometric', 'perField']).optional(),
  polarisation: oneOf(['plus-minus-i-cross', 'plus-plus-i-cross']).optional(),
  negativeM: oneOf(['mirror', 'given', 'none']).optional(),
  psi4Factor: z.union([z.literal(1), z.literal(0.5), z.literal(2)], { error: '1, 0.5 or 2' }).optional(),
  tetrad: oneOf(['symmetric', 'kinnersley']).optional(),
  extractionRadiusM: positive('a radius in M above zero').optional(),
  radiusType: oneOf(['areal', 'isotropic', 'coordinate']).optional(),
  timeLabel: oneOf(['retarded', 'coordinate']).optional(),
  totalMassMsun: finite('a mass from 0.1 to 1e10 M☉').min(0.1, { error: 'a mass from 0.1 to 1e10 M☉' }).max(1e10, { error: 'a mass from 0.1 to 1e10 M☉' }).optional(),
  distanceMpc: finite('a distance from 1e-3 to 1e6 Mpc').min(1e-3, { error: 'a distance from 1e-3 to 1e6 Mpc' }).max(1e6, { error: 'a distance from 1e-3 to 1e6 Mpc' }).optional(),
  resolution: positive('a grid spacing in M above zero').optional(),
  series: text(80).optional(),
  junkEndM: finite('a time on the file’s own axis').optional(),
  binary: binarySchema.optional(),
}, { error: 'an object that describes a waveform' });
export type RawWaveform = z.infer<typeof waveformSchema>;

export const noiseSchema = z.strictObject({
  file: path.optional(),
  datasets: z.record(z.string(), z.string(), { error: 'an object such as {"f": "/f", "asd": "/asd"}' }).optional(),
  columns: columns.optional(),
  sided: oneOf(['one', 'two']).optional(),
  curve: text(80, 'the id of a built-in curve').optional(),
}, { error: 'an object that describes a noise curve' });
export type RawNoise = z.infer<typeof noiseSchema>;

export const claimSchema = z.strictObject({
  id: z.string({ error: nameRule }).refine(isName, { error: nameRule }),
  quantity: text(80, 'the id of a quantity'),
  of: z.record(z.string(), z.unknown(), { error: 'an object such as {"a": "A", "b": "B"}' }),
  noise: text(80, 'the name of a noise curve of this sheet').optional(),
  settings: z.record(z.string(), z.unknown(), { error: 'an object of settings' }).optional(),
  over: z.record(z.string(), z.unknown(), { error: 'an object with one swept setting' }).optional(),
  claimed: z.unknown().nonoptional({ error: 'the claimed value' }),
  tolerance: finite('a tolerance of zero or more').min(0, { error: 'a tolerance of zero or more' }).nullish(),
}, { error: 'an object that states a claim' });
export type RawClaim = z.infer<typeof claimSchema>;

export const sheetSchema = z.strictObject({
  format: z.literal(claimFormat, { error: `"${claimFormat}"` }),
  title: text(500).optional(),
  statement: text(200_000).optional(),
  waveforms: z.record(z.string(), z.unknown(), { error: 'an object of waveforms by name' }).optional(),
  noise: z.record(z.string(), z.unknown(), { error: 'an object of noise curves by name' }).optional(),
  claims: z.array(z.unknown(), { error: 'a list of claims' }).min(1, { error: 'at least one claim' }).max(1000, { error: 'at most 1000 claims' }),
}, { error: 'a claim sheet: an object with "format", "waveforms" and "claims"' });
