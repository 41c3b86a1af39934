import type { Quantity } from '@/lib/engine/contract/quantity';
import { houseLimitObservable, houseMatchThreshold, houseOrderObservable, houseRecoilMass, houseValues, mirroringWindow, ringdownWindow } from '@/lib/engine/contract/house-values';
import { observables, publishedFits, type SettingName } from '@/lib/engine/contract/settings';

/**
 * Every setting of a claim: type, range, unit, house default and meaning (settings.md section 1
 * and the sections in use). The sheet's schema, the composer's form and the methods pages are
 * drawn from this table, so a setting is described once.
 */
export type SettingShape =
  | { readonly kind: 'number'; readonly min?: number; readonly max?: number; readonly above?: number }
  | { readonly kind: 'integer'; readonly min: number; readonly max: number }
  | { readonly kind: 'choice'; readonly options: readonly (string | boolean)[] }
  | { readonly kind: 'subset'; readonly options: readonly string[] }
  | { readonly kind: 'interval'; readonly min?: number; readonly max?: number }
  | { readonly kind: 'modes' }
  | { readonly kind: 'response' }
  | { readonly kind: 'taper'; readonly min: number; readonly max: number }
  | { readonly kind: 'cosmology' }
  /** A word, one named number such as {"timeM": 100}, or a flag such as {"ringdown": true}; `swept` names the number that a sweep goes over. */
  | { readonly kind: 'place'; readonly options: readonly string[]; readonly numbers: readonly { readonly name: string; readonly above?: number }[]; readonly flags?: readonly string[]; readonly swept?: string };

export interface SettingRow {
  readonly name: SettingName;
  readonly shape: SettingShape;
  /** Printed after the value; empty for numbers without one. */
  readonly unit: string;
  /** In words; what stands in the box when nothing is declared. */
  readonly houseDefault: string;
  readonly meaning: string;
}

const row = (name: SettingName, shape: SettingShape, unit: string, houseDefault: string, meaning: string): SettingRow => ({ name, shape, unit, houseDefault, meaning });

/** A default as the engine has it, in the spelling of a sheet. */
function said(name: keyof typeof houseValues): string {
  const value: unknown = houseValues[name];
  if (Array.isArray(value)) return value.every((part) => typeof part === 'number') ? `[${value.join(', ')}]` : value.join(', ');
  return String(value);
}
const { h0, omegaM } = houseValues.cosmology;

const rows: readonly SettingRow[] = [
  row('totalMassMsun', { kind: 'number', min: 0.1, max: 1e10 }, 'M☉', 'required for waveforms in M; else the file’s own', 'Total mass of the binary: stretches time and scales amplitude.'),
  row('massFrame', { kind: 'choice', options: ['detector', 'source'] }, '', 'detector; source for horizons where the mass can be rescaled', 'What the mass means; a source-frame mass enters the response as M(1+z).'),
  row('redshift', { kind: 'number', min: 0, max: 100 }, '', 'from the distance and the cosmology, for source-frame masses', 'Redshift of the source.'),
  row('distanceMpc', { kind: 'number', min: 1e-3, max: 1e6 }, 'Mpc', 'required for loudness of waveforms in M; else the file’s own', 'Luminosity distance.'),
  row('fLowHz', { kind: 'number', above: 0 }, 'Hz', 'first frequency of the noise curve', 'Lower edge of the band, exact.'),
  row('fHighHz', { kind: 'number', above: 0 }, 'Hz', 'the lower of the noise curve’s end and the lowest Nyquist frequency', 'Upper edge of the band, exact.'),
  row('maximise', { kind: 'subset', options: ['time', 'phase', 'polarisation', 'inclination', 'templateMass'] }, '', said('maximise'), 'What the second waveform may be moved in, jointly.'),
  row('inclinationRad', { kind: 'number', min: 0, max: Math.PI }, 'rad', `${said('inclinationRad')} (face-on)`, 'Inclination of the line of sight.'),
  row('azimuthRad', { kind: 'number', min: -2 * Math.PI, max: 2 * Math.PI }, 'rad', said('azimuthRad'), 'Azimuth of the line of sight.'),
  row('response', { kind: 'response' }, '', said('response'), 'Which polarisation the detector sees, or its two factors.'),
  row('modes', { kind: 'modes' }, '', said('modes'), 'The modes used.'),
  row('lMax', { kind: 'integer', min: 2, max: 12 }, '', 'the highest given', 'Leaves out modes of higher ℓ.'),
  row('average', { kind: 'choice', options: ['optimal', 'sky', 'sky-orientation', 'volume'] }, '', said('average'), 'Over which directions the loudness is averaged.'),
  row('detectors', { kind: 'integer', min: 1, max: 10 }, '', said('detectors'), 'Equal detectors in one place: loudness times √N.'),
  row('armAngleDeg', { kind: 'number', min: 1, max: 90 }, '°', said('armAngleDeg'), 'Opening angle of the detector’s arms.'),
  row('taper', { kind: 'taper', min: 0.1, max: 10 }, '', `${said('taper')} (1)`, 'Multiplies both ramp lengths of the taper.'),
  row('threshold', { kind: 'number', above: 0 }, '', `${said('threshold')} for loudness, ${houseMatchThreshold} for a detectable fraction`, 'The loudness, or the match, at which something counts as seen.'),
  row('cosmology', { kind: 'cosmology' }, '', `h0 ${h0} km/s/Mpc, omegaM ${omegaM}, flat`, 'Expansion used between redshift and distance.'),
  row('startM', { kind: 'number' }, 'M', 'the declared end of the start-up burst, else the first sample', 'Start of integrals over time.'),
  row('window', { kind: 'interval' }, 'M', `for a ringdown [${ringdownWindow.join(', ')}] after the peak; [${mirroringWindow.join(', ')}] around the peak of ψ₄ for a mirroring; for an alignment from 10 % to 40 % of the way from the later start to the peak of the first record; for an order from the latest start of the runs to where the finest one falls below a tenth of its peak`, 'Interval of time that is used: counted from the peak for a ringdown or a mirroring, on the first record’s own times for an alignment, on the times of the runs for an order.'),
  row('alignment', { kind: 'place', options: ['window', 'peak', 'none'], numbers: [{ name: 'frequencyM', above: 0 }] }, '', said('alignment'), 'How the second record is laid over the first in time and phase: over the window, at the peaks, where both reach a frequency (rad/M), or not at all.'),
  row('at', { kind: 'place', options: ['peak', 'end', 'window', 'maximum'], numbers: [{ name: 'timeM' }, { name: 'frequencyM', above: 0 }], flags: ['ringdown'], swept: 'timeM' }, 'M', `${said('at')}; {"ringdown": true} for an electromagnetic frequency`, 'Where a curve is read: at the peak or the end of the first record, as a mean over the window, where it is largest, at a time, or where the first record reaches a frequency (rad/M); for an electromagnetic frequency also the value of the ringdown.'),
  row('integrationFloor', { kind: 'number', above: 0 }, 'rad/M', 'half of ω₂₂ at the start', 'Lowest frequency by which a time integral divides.'),
  row('includeEnergyBeforeStart', { kind: 'choice', options: [false, true, 'removed'] }, '', said('includeEnergyBeforeStart'), 'Adds what was radiated before the start.'),
  row('normaliseBy', { kind: 'choice', options: ['M', 'adm', 'remnant'] }, '', `${said('normaliseBy')}; ${houseRecoilMass} for recoil`, 'The mass to which the number is referred.'),
  row('parameters', { kind: 'integer', min: 1, max: 20 }, '', said('parameters'), 'Number of parameters in the criterion.'),
  row('rateLaw', { kind: 'choice', options: ['euclidean', 'comoving'] }, '', said('rateLaw'), 'How loudness becomes volume.'),
  row('templateMassRange', { kind: 'interval', min: 0.01, max: 100 }, '× M', said('templateMassRange'), 'Range of the template’s mass when it is maximised over.'),
  row('joinHz', { kind: 'number', above: 0 }, 'Hz', 'required', 'Frequency at which the post-Newtonian amplitude ends and the numerical one begins.'),
  row('amplitudeOrder', { kind: 'integer', min: 0, max: 1 }, '', said('amplitudeOrder'), 'Order of the post-Newtonian amplitude: 0 restricted, 1 with the first correction.'),
  row('formalOrder', { kind: 'number', above: 0, max: 20 }, '', 'measured from three runs', 'Order of convergence that is taken instead of the measured one.'),
  row('extrapolationOrder', { kind: 'integer', min: 1, max: 4 }, '', said('extrapolationOrder'), 'Degree of the polynomial in 1/r.'),
  row('weight', { kind: 'choice', options: ['plane', 'diagonal', 'plane-volume', 'diagonal-volume'] }, '', said('weight'), 'Measure over spins: both uniform and independent, equal spins uniform, or either times the volume in which the signal is heard.'),
  row('statistic', { kind: 'choice', options: ['minimum', 'mean', 'weighted'] }, '', said('statistic'), 'Which number stands for all azimuths: the least match, the mean, or the mean weighted by loudness.'),
  row('observable', { kind: 'choice', options: observables }, '', `mass for a fit, ${houseOrderObservable} for an order, ${houseLimitObservable} for an extrapolation`, 'What is fitted, compared or extrapolated.'),
  row('method', { kind: 'choice', options: ['balance-adm', 'balance-pn', 'ringdown'] }, '', 'balance-adm when the initial energy is stated, else balance-pn', 'How the remnant is found: what was there less what left, from the stated or the post-Newtonian start, or from its ringing.'),
  row('fit', { kind: 'choice', options: publishedFits }, '', `${said('fit')} of the fits that apply`, 'Which published fit is evaluated.'),
  row('fieldGauss', { kind: 'number', min: 1, max: 1e18 }, 'G', 'as computed; nothing is rescaled', 'Magnetic field to which electromagnetic energy is rescaled.'),
  row('plasmaDensityCm3', { kind: 'number', min: 1e-6, max: 1e12 }, 'cm⁻³', said('plasmaDensityCm3'), 'Electrons in each cubic centimetre of the plasma that the waves meet.'),
  row('radiativeEfficiency', { kind: 'number', min: 0, max: 1 }, '', 'none', 'Share of the accreted rest energy that is radiated.'),
  row('accretionRateMsunPerYear', { kind: 'number', above: 0 }, 'M☉/yr', 'none', 'Rate at which the disc feeds the hole.'),
  row('internalEnergyErg', { kind: 'number', above: 0 }, 'erg', 'none', 'Internal energy of the gas, for its cooling time.'),
  row('radiusM', { kind: 'number', above: 0 }, 'M', 'none', 'Radius at which the dynamical time is taken.'),
  row('massRatio', { kind: 'number', above: 0, max: 1e6 }, '', 'the waveform’s own', 'Heavier over lighter mass, q ≥ 1.'),
  row('chi1z', { kind: 'number', min: -1, max: 1 }, '', 'the waveform’s own', 'Spin of the heavier body along the orbital angular momentum.'),
  row('chi2z', { kind: 'number', min: -1, max: 1 }, '', 'the waveform’s own', 'Spin of the lighter body along the orbital angular momentum.'),
];

export const settingsTable: ReadonlyMap<SettingName, SettingRow> = new Map(rows.map((entry) => [entry.name, entry]));

/** The settings of a quantity, each with the words that it takes. */
export const settingRows = ({ settings, choices }: Pick<Quantity, 'settings' | 'choices'>): readonly SettingRow[] =>
  settings.flatMap((name) => {
    const row = settingsTable.get(name);
    return row ? [narrowed(row, choices?.[name])] : [];
  });

/** The words that this quantity takes, where it takes fewer than the setting has. */
function narrowed(row: SettingRow, choices: readonly string[] | undefined): SettingRow {
  if (!choices) return row;
  const kept = (word: string | boolean): boolean => choices.includes(String(word));
  const { shape } = row;
  if (shape.kind === 'choice') return { ...row, shape: { ...shape, options: shape.options.filter(kept) } };
  if (shape.kind === 'place') return { ...row, shape: { ...shape, options: shape.options.filter(kept), numbers: shape.numbers.filter(({ name }) => kept(name)), flags: (shape.flags ?? []).filter(kept) } };
  return row;
}
