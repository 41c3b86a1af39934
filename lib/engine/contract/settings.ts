/**
 * Declared settings of a claim, as the sheet gives them after type and range checks.
 * Names and meanings: the settings table (`engine/quantities/settings-table.ts`).
 */
export type Response = 'plus' | 'cross' | 'complex' | { readonly plus: number; readonly cross: number };
export type MaximiseOver = 'time' | 'phase' | 'polarisation' | 'inclination' | 'templateMass';
/** How two records are laid over each other. */
export type Alignment = 'window' | 'peak' | 'none' | { readonly frequencyM: number };
/** Where a curve is read. */
export type ReadAt = 'peak' | 'end' | 'window' | 'maximum' | { readonly timeM: number } | { readonly frequencyM: number };
/** Of a frequency: the value of the ringdown. */
export type AtRingdown = { readonly ringdown: true };
/** What is extrapolated or fitted: a number of one run, a curve of it, or a number of the remnant. */
export const observables = [
  'dominant', 'phase', 'amplitude', 'complex', 'phase-at-peak', 'amplitude-at-peak', 'radiated-energy', 'radiated-angular-momentum', 'recoil', 'peak-luminosity',
  'remnant-mass', 'remnant-spin', 'ringdown-frequency', 'ringdown-damping', 'cycles', 'eccentricity', 'mass', 'spin',
] as const;
export type Observable = (typeof observables)[number];
/** Published fits of the remnant, its luminosity and its recoil, and their plain mean. */
export const publishedFits = ['mean', 'pan2011', 'husa2016', 'healy2014', 'jimenez2017', 'buonanno2008', 'keitel2017', 'healy2017', 'campanelli2007'] as const;
export type PublishedFit = (typeof publishedFits)[number];
export type ModeIndex = readonly [l: number, m: number];

export interface DeclaredSettings {
  readonly totalMassMsun?: number;
  readonly massFrame?: 'detector' | 'source';
  readonly redshift?: number;
  readonly distanceMpc?: number;
  readonly fLowHz?: number;
  readonly fHighHz?: number;
  readonly maximise?: readonly MaximiseOver[];
  readonly inclinationRad?: number;
  readonly azimuthRad?: number;
  readonly response?: Response;
  readonly modes?: 'all' | readonly ModeIndex[];
  readonly lMax?: number;
  readonly average?: 'optimal' | 'sky' | 'sky-orientation' | 'volume';
  readonly detectors?: number;
  readonly armAngleDeg?: number;
  readonly taper?: 'auto' | 'none' | number;
  readonly threshold?: number;
  readonly cosmology?: { readonly h0: number; readonly omegaM: number };
  readonly startM?: number;
  readonly window?: readonly [number, number];
  readonly integrationFloor?: number;
  readonly includeEnergyBeforeStart?: false | true | 'removed';
  readonly normaliseBy?: 'M' | 'adm' | 'remnant';
  readonly alignment?: Alignment;
  readonly at?: ReadAt | AtRingdown;
  readonly parameters?: number;
  readonly rateLaw?: 'euclidean' | 'comoving';
  readonly templateMassRange?: readonly [number, number];
  readonly joinHz?: number;
  readonly amplitudeOrder?: number;
  readonly formalOrder?: number;
  readonly extrapolationOrder?: number;
  readonly weight?: 'plane' | 'diagonal' | 'plane-volume' | 'diagonal-volume';
  readonly statistic?: 'minimum' | 'mean' | 'weighted';
  readonly observable?: Observable;
  readonly method?: 'balance-adm' | 'balance-pn' | 'ringdown';
  readonly fit?: PublishedFit;
  readonly fieldGauss?: number;
  readonly plasmaDensityCm3?: number;
  readonly radiativeEfficiency?: number;
  readonly accretionRateMsunPerYear?: number;
  readonly internalEnergyErg?: number;
  readonly radiusM?: number;
  readonly massRatio?: number;
  readonly chi1z?: number;
  readonly chi2z?: number;
}
export type SettingName = keyof DeclaredSettings;
