import { houseValues } from '@/lib/engine/contract/house-values';
import type { DeclaredSettings, MaximiseOver, Response, SettingName } from '@/lib/engine/contract/settings';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Band, Side } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { luminosityDistanceMpc, redshiftAt, type Cosmology } from '@/lib/engine/units/cosmology';
import type { ConditionedWaveform } from './condition-waveform';
import { nyquistFrequency } from './nyquist-frequency';
import type { Place } from '@/lib/kernel/place';

/** What a quantity makes of the common settings. */
export interface DetectorTraits {
  readonly maximise: readonly MaximiseOver[] | null;
  /** Takes an average over directions, detectors and arm angle into its value. */
  readonly loudness: boolean;
  /** Its value scales with the number of detectors and their angle (a ratio's does not). */
  readonly absolute: boolean;
  /** Needs a distance; otherwise any will do. */
  readonly needsDistance: boolean;
  /** Solves for a distance at a threshold (horizons, comoving volumes). */
  readonly horizon: boolean;
  /** Its value is a redshift or what lies within one: in either frame a distance is turned into it. */
  readonly inRedshift?: boolean;
  /** Polarisations that are looked at unless the claim names others. */
  readonly response?: Response;
  /** Angles of the line of sight that the quantity goes over by itself where the claim does not fix them. */
  readonly goesOver?: { readonly inclination: boolean; readonly azimuth: boolean };
  /** Takes one waveform up to a frequency, and a closed form below. */
  readonly joined?: true;
}

export type Average = 'optimal' | 'sky' | 'sky-orientation' | 'volume';

/** Effective settings of one point, defaults filled in. */
export interface DetectorPoint {
  readonly at: Place;
  readonly declared: DeclaredSettings;
  readonly massMsun: number | null;
  readonly massFrame: 'detector' | 'source';
  /** 0 for detector-frame masses. */
  readonly redshift: number;
  readonly distanceMpc: number | null;
  readonly band: Band;
  readonly maximise: readonly MaximiseOver[];
  readonly response: Response;
  readonly average: Average;
  readonly detectors: number;
  readonly armAngleDeg: number;
  readonly threshold: number;
  readonly cosmology: Cosmology;
  readonly templateMassRange: readonly [number, number];
  readonly a: Side;
  readonly b: Side | null;
  /** Of quantities that take lists; else empty. */
  readonly signals: readonly Side[];
  readonly templates: readonly Side[];
}

/** Stands in where a distance cancels. */
export const ANY_DISTANCE_MPC = 1000;

/** A strain in rh/M against seconds has its own mass and needs no distance. */
export const canRescale = (w: Waveform): boolean => w.unit === 'M' || (w.ownTotalMassMsun !== null && (w.ownDistanceMpc !== null || w.amplitudeUnit === 'rh/M'));

const carriesMass = (w: Waveform): boolean => w.unit === 'M' || w.amplitudeUnit !== 'strain' || w.ownTotalMassMsun !== null;

export function massFrameOf(declared: DeclaredSettings, waveforms: readonly Waveform[], traits: DetectorTraits): 'detector' | 'source' {
  return declared.massFrame ?? (traits.horizon && waveforms.every(canRescale) ? 'source' : 'detector');
}

/** Seconds per unit of time: GM(1+z)/c³, or M(1+z)/M₀ of a physical series that may be stretched. */
function secondsPerUnit(w: Waveform, massMsun: number | null, redshift: number): number {
  const stretched = (massMsun ?? w.ownTotalMassMsun ?? Number.NaN) * (1 + redshift);
  if (w.unit === 'M') return stretched * MSUN_S;
  if (w.ownTotalMassMsun === null) return 1;
  return stretched / w.ownTotalMassMsun;
}

/** Strain per unit of amplitude: GM(1+z)/c²D, or (M(1+z)/M₀)(D₀/D). */
function strainPerUnit(w: Waveform, massMsun: number | null, redshift: number, distanceMpc: number | null): number {
  const stretched = (massMsun ?? w.ownTotalMassMsun ?? Number.NaN) * (1 + redshift);
  if (w.amplitudeUnit !== 'strain') return (stretched * MSUN_PER_MPC) / (distanceMpc ?? w.ownDistanceMpc ?? ANY_DISTANCE_MPC);
  const byMass = w.ownTotalMassMsun === null ? 1 : stretched / w.ownTotalMassMsun;
  const byDistance = w.ownDistanceMpc === null || distanceMpc === null ? 1 : w.ownDistanceMpc / distanceMpc;
  return byMass * byDistance;
}

export interface PointRequest {
  readonly declared: DeclaredSettings;
  readonly at: Place;
  readonly a: ConditionedWaveform;
  readonly b: ConditionedWaveform | null;
  /** Lists, for quantities that take them; `a` is then the first of the signals. */
  readonly signals?: readonly ConditionedWaveform[];
  readonly templates?: readonly ConditionedWaveform[];
  readonly noise: NoiseCurve;
  readonly traits: DetectorTraits;
}

/** Every waveform of a request, each once. */
export const waveformsIn = ({ a, b, signals = [], templates = [] }: PointRequest): ConditionedWaveform[] => [...new Set([a, ...(b === null ? [] : [b]), ...signals, ...templates])];

/** The request with another waveform in the place of each. */
export const withEach = (request: PointRequest, by: (c: ConditionedWaveform) => ConditionedWaveform): PointRequest => ({
  ...request,
  a: by(request.a),
  b: request.b === null ? null : by(request.b),
  ...(request.signals === undefined ? {} : { signals: request.signals.map(by) }),
  ...(request.templates === undefined ? {} : { templates: request.templates.map(by) }),
});

/** The side by which a waveform of the request enters a point. */
export function sideIn(point: DetectorPoint, { a, b, signals = [], templates = [] }: PointRequest, c: ConditionedWaveform): Side {
  if (c === a) return point.a;
  if (c === b && point.b !== null) return point.b;
  return point.signals[signals.indexOf(c)] ?? point.templates[templates.indexOf(c)] ?? point.a;
}

interface Scale {
  readonly massMsun: number | null;
  readonly massFrame: 'detector' | 'source';
  readonly redshift: number;
  readonly distanceMpc: number | null;
}

function scaleOf(request: PointRequest): Scale {
  const { declared, a, traits } = request;
  const waveforms = waveformsIn(request).map(({ given }) => given);
  const cosmology = declared.cosmology ?? houseValues.cosmology;
  const massMsun = declared.totalMassMsun ?? null;
  const massFrame = massFrameOf(declared, waveforms, traits);
  const fromRedshift =
    declared.redshift === undefined || !traits.needsDistance || traits.horizon ? null : luminosityDistanceMpc(declared.redshift, cosmology);
  const distanceMpc = declared.distanceMpc ?? fromRedshift;
  if (massFrame === 'detector' || traits.horizon) return { massMsun, massFrame, redshift: 0, distanceMpc };
  const own = a.given.ownDistanceMpc;
  const known = declared.distanceMpc ?? own;
  const redshift = declared.redshift ?? (known === null ? Number.NaN : redshiftAt(known, cosmology));
  return { massMsun, massFrame, redshift, distanceMpc };
}

const sideOf = (c: ConditionedWaveform, declared: DeclaredSettings, scale: Scale): Side => ({
  waveform: c.used(declared.lMax ?? null),
  taper: c.taper(declared.taper ?? houseValues.taper, declared.lMax ?? null).window,
  secondsPerUnit: secondsPerUnit(c.given, scale.massMsun, scale.redshift),
  strainPerUnit: strainPerUnit(c.given, scale.massMsun, scale.redshift, scale.distanceMpc),
  inclinationRad: declared.inclinationRad ?? houseValues.inclinationRad,
  azimuthRad: declared.azimuthRad ?? houseValues.azimuthRad,
});

/** Upper edge when none is declared: the lower of the curve's end and the lowest Nyquist frequency in use. */
export const defaultTopHz = (noise: NoiseCurve, sides: readonly Side[]): number =>
  Math.min(noise.fHighHz, ...sides.map((side) => nyquistFrequency(side.waveform) / side.secondsPerUnit));

/** A point at another redshift of its mass and another distance, as horizons ask for it. */
export function pointAtRedshift(request: PointRequest, redshift: number, distanceMpc: number): DetectorPoint {
  return assemble(request, { massMsun: request.declared.totalMassMsun ?? null, massFrame: 'source', redshift, distanceMpc });
}

/**
 * Turns the declared settings of one point into what the routes take.
 * Shape:  `declared` holds the swept value already.
 * Units:  as the names say.
 * Error:  none.
 * Fails:  never; a mass or redshift that is needed and not there gives NaN, which stops the claim.
 * Source: settings.md sections 1 and 2.
 */
export const detectorPoint = (request: PointRequest): DetectorPoint => assemble(request, scaleOf(request));

function assemble(request: PointRequest, scale: Scale): DetectorPoint {
  const { declared, at, noise, traits } = request;
  const made = new Map(waveformsIn(request).map((c) => [c, sideOf(c, declared, scale)] as const));
  const side = (c: ConditionedWaveform): Side => made.get(c)!;
  const sides = [...made.values()];
  return {
    at,
    declared,
    ...scale,
    band: { noise, fLowHz: declared.fLowHz ?? noise.fLowHz, fHighHz: declared.fHighHz ?? defaultTopHz(noise, sides) },
    maximise: traits.maximise === null ? [] : (declared.maximise ?? traits.maximise),
    response: declared.response ?? traits.response ?? houseValues.response,
    average: declared.average ?? houseValues.average,
    detectors: declared.detectors ?? houseValues.detectors,
    armAngleDeg: declared.armAngleDeg ?? houseValues.armAngleDeg,
    threshold: declared.threshold ?? houseValues.threshold,
    cosmology: declared.cosmology ?? houseValues.cosmology,
    templateMassRange: declared.templateMassRange ?? houseValues.templateMassRange,
    a: side(request.a),
    b: request.b === null ? null : side(request.b),
    signals: (request.signals ?? []).map(side),
    templates: (request.templates ?? []).map(side),
  };
}

/**
 * Settings that have no default: a mass for waveforms in M, a distance for their loudness, a redshift for source-frame masses.
 * Shape:  any number of waveforms; a list of names.
 * Units:  none: only what is declared is looked at.
 * Error:  none.
 * Fails:  never; what is missing is the answer.
 * Source: our rule: no number is invented that would scale the result.
 */
export function requiredSettings(
  waveforms: readonly Waveform[],
  declared: DeclaredSettings,
  over: SettingName | null,
  traits: DetectorTraits,
): SettingName[] {
  const has = (name: SettingName): boolean => declared[name] !== undefined || over === name;
  const needed: SettingName[] = [];
  const inMass = waveforms.some((w) => w.unit === 'M' || w.amplitudeUnit !== 'strain');
  if (inMass && !has('totalMassMsun')) needed.push('totalMassMsun');
  const ownDistance = waveforms.every((w) => w.ownDistanceMpc !== null);
  const physical = waveforms.every((w) => w.amplitudeUnit === 'strain');
  if (traits.needsDistance && !traits.horizon && inMass && !ownDistance && !has('distanceMpc') && !has('redshift'))
    needed.push('distanceMpc');
  // A physical strain without a distance of its own has no horizon: there is nothing to scale from.
  if (traits.needsDistance && traits.horizon && physical && !ownDistance) needed.push('distanceMpc');
  const source = massFrameOf(declared, waveforms, traits) === 'source' && !traits.horizon;
  if (source && !has('redshift') && !has('distanceMpc') && !ownDistance) needed.push('redshift');
  return needed;
}

export const massMatters = (waveforms: readonly Waveform[]): boolean => waveforms.some(carriesMass);
