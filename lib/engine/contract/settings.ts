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
  readonly at?: ReadAt;
  readonly parameters?: number;
  readonly rateLaw?: 'euclidean' | 'comoving';
  readonly templateMassRange?: readonly [number, number];
  readonly massRatio?: number;
  readonly chi1z?: number;
  readonly chi2z?: number;
}
export type SettingName = keyof DeclaredSettings;
