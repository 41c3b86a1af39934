import { detectorPoint, pointAtRedshift, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute } from '@/lib/engine/contract/route';
import { luminosityDistanceMpc, redshiftAt } from '@/lib/engine/units/cosmology';
import { loudness } from './loudness';
import type { RouteKit } from './recipe';

export interface Horizon {
  readonly distanceMpc: number;
  readonly redshift: number;
  /** Every redshift at which the loudness crosses the threshold, rising. */
  readonly roots: readonly number[];
}

const LEAST_Z = 1e-3;
const MOST_Z = 50;
const SCAN_POINTS = 400;
const ROOT = 1e-8;
/** Route B solves on fewer points of its own, evenly spaced in ln(1 + z/0.1), and bends cubics through ln ρ between them. */
const OWN_POINTS = 40;
const OWN_SCALE = 0.1;
const FINE = 10;

const none: Horizon = { distanceMpc: Number.NaN, redshift: Number.NaN, roots: [] };

/** ρ of the redshifted mass at 1 Mpc; 0 when its samples carry nothing in the band. */
function loudnessAt(route: DetectorRoute, request: PointRequest, z: number): number {
  const point = pointAtRedshift(request, z, 1);
  return point.band.fHighHz > point.band.fLowHz ? loudness(route, point.a, point) : 0;
}

/** ln(ρ[(1+z)M, D_L(z)]/ρ*): a logarithm, so that a secant sees nearly a straight line. */
export function excessAt(route: DetectorRoute, request: PointRequest, z: number): number {
  const { cosmology, threshold } = detectorPoint(request);
  return Math.log(loudnessAt(route, request, z) / luminosityDistanceMpc(z, cosmology) / threshold);
}

/** Bisection with secant steps between two ends of opposite sign. */
function rootBetween(f: (z: number) => number, from: number, to: number, fFrom: number, fTo: number): number {
  let [a, b, fa, fb] = [from, to, fFrom, fTo];
  for (let round = 0; round < 100 && Math.abs(b - a) > ROOT * 0.01 * (1 + Math.abs(a)); round++) {
    const secant = b - (fb * (b - a)) / (fb - fa);
    const inside = Number.isFinite(secant) && secant > Math.min(a, b) && secant < Math.max(a, b);
    // Every third round halves, so that a bent curve cannot hold one end for ever.
    const z = inside && round % 3 !== 2 ? secant : (a + b) / 2;
    const fz = f(z);
    if (fz === 0) return z;
    if (Math.sign(fz) === Math.sign(fa)) [a, fa] = [z, fz];
    else [b, fb] = [z, fz];
    if (inside && Math.abs(fz) < 1e-13) return z;
  }
  return (a + b) / 2;
}

const logSpaced = (n: number): number[] => Array.from({ length: n }, (_, i) => LEAST_Z * (MOST_Z / LEAST_Z) ** (i / (n - 1)));

interface Bracket {
  readonly from: number;
  readonly to: number;
}

function bracketsIn(z: readonly number[], values: readonly number[]): Bracket[] {
  const found: Bracket[] = [];
  for (let i = 1; i < z.length; i++) {
    const [p, q] = [values[i - 1]!, values[i]!];
    if (Number.isNaN(p) || Number.isNaN(q)) continue;
    if (p > 0 !== q > 0) found.push({ from: z[i - 1]!, to: z[i]! });
  }
  return found;
}

/** Route A: the scan of the rule, 400 points of a fast sweep. */
function scanned({ scan }: RouteKit, request: PointRequest): Bracket[] {
  const z = logSpaced(SCAN_POINTS);
  return bracketsIn(
    z,
    z.map((at) => excessAt(scan, request, at)),
  );
}

/** Cubic through the four nearest of evenly spaced values. */
function cubicAt(values: readonly number[], place: number): number {
  const i = Math.max(1, Math.min(values.length - 3, Math.floor(place)));
  const x = place - i;
  const [a, b, c, d] = [values[i - 1]!, values[i]!, values[i + 1]!, values[i + 2]!];
  return b + x * (c - a / 3 - b / 2 - d / 6 + x * ((a + c) / 2 - b + (x * (3 * (b - c) + d - a)) / 6));
}

/** Redshifts evenly spaced in ln(1 + z/0.1): the mass that the detector sees changes by as much from point to point. */
function ownRedshifts(n: number): number[] {
  const [from, to] = [Math.log1p(LEAST_Z / OWN_SCALE), Math.log1p(MOST_Z / OWN_SCALE)];
  return Array.from({ length: n }, (_, i) => OWN_SCALE * Math.expm1(from + ((to - from) * i) / (n - 1)));
}

/** Silence, as a logarithm that a cubic can pass through. */
const SILENT = -100;

/** Route B: its own loudness at fewer redshifts, interpolated without the distance, which is known between them. */
function interpolated({ scan }: RouteKit, request: PointRequest): Bracket[] {
  const { cosmology, threshold } = detectorPoint(request);
  const lnRho = ownRedshifts(OWN_POINTS).map((z) => Math.max(SILENT, Math.log(loudnessAt(scan, request, z)) || SILENT));
  const fine = ownRedshifts(FINE * (OWN_POINTS - 1) + 1);
  return bracketsIn(
    fine,
    fine.map((z, i) => cubicAt(lnRho, i / FINE) - Math.log(luminosityDistanceMpc(z, cosmology) * threshold)),
  );
}

/** A bracket read off an interpolation is widened until the route itself changes sign there. */
function confirmed(f: (z: number) => number, bracket: Bracket): { from: number; to: number; fFrom: number; fTo: number } | null {
  let { from, to } = bracket;
  for (let round = 0; round < 8; round++) {
    const [fFrom, fTo] = [f(from), f(to)];
    if (fFrom > 0 !== fTo > 0) return { from, to, fFrom, fTo };
    const width = to - from;
    [from, to] = [Math.max(LEAST_Z, from - width), Math.min(MOST_Z, to + width)];
  }
  return null;
}

function solved(kit: RouteKit, request: PointRequest): number[] {
  const f = (z: number): number => excessAt(kit.route, request, z);
  const brackets = kit.route.name === 'A' ? scanned(kit, request) : interpolated(kit, request);
  const roots = brackets.flatMap((bracket) => {
    const ends = confirmed(f, bracket);
    return ends === null ? [] : [rootBetween(f, ends.from, ends.to, ends.fFrom, ends.fTo)];
  });
  return roots.filter((z, i) => i === 0 || z - roots[i - 1]! > ROOT * 10);
}

/** D ρ/ρ*, with nothing redshifted. */
function unredshifted(kit: RouteKit, request: PointRequest): Horizon {
  const point: DetectorPoint = detectorPoint(request);
  const at = point.distanceMpc ?? point.a.waveform.ownDistanceMpc ?? 1000;
  const distanceMpc = (at * loudness(kit.route, point.a, point)) / point.threshold;
  if (!(distanceMpc > 0) || !Number.isFinite(distanceMpc)) return none;
  const redshift = redshiftAt(distanceMpc, point.cosmology);
  return { distanceMpc, redshift, roots: [redshift] };
}

const isSource = (request: PointRequest): boolean => detectorPoint(request).massFrame === 'source';

/**
 * How far away a signal reaches the threshold.
 * Shape:  the farthest root with all roots; NaN and none when nothing crosses between z = 1e-3 and 50.
 * Units:  Mpc, redshift.
 * Error:  roots to 1e-8; loudness as the route gives it.
 * Fails:  NaN where the threshold is nowhere crossed.
 * Source: settings.md section 4 (Q08): ρ[(1+z)M, D_L(z)] = ρ*, or D·ρ/ρ* for detector-frame masses.
 */
export function horizonOf(kit: RouteKit, request: PointRequest): Horizon {
  if (!isSource(request)) return unredshifted(kit, request);
  const roots = solved(kit, request);
  const redshift = roots[roots.length - 1];
  if (redshift === undefined) return none;
  return { distanceMpc: luminosityDistanceMpc(redshift, detectorPoint(request).cosmology), redshift, roots };
}

/** The same root under other numerics or data, by secant from where it was. */
export function horizonAgain(kit: RouteKit, request: PointRequest, near: number): Horizon {
  if (!isSource(request)) return unredshifted(kit, request);
  const f = (z: number): number => excessAt(kit.route, request, z);
  let [a, b] = [near, near * (1 + 1e-4)];
  let [fa, fb] = [f(a), f(b)];
  for (let round = 0; round < 20 && Math.abs(fa) > 1e-14 && fa !== fb; round++) {
    const next = a - (fa * (b - a)) / (fb - fa);
    [b, fb] = [a, fa];
    [a, fa] = [next, f(next)];
    if (Math.abs(a - b) < 1e-12 * a) break;
  }
  return { distanceMpc: luminosityDistanceMpc(a, detectorPoint(request).cosmology), redshift: a, roots: [a] };
}
