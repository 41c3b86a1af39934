import { ANY_DISTANCE_MPC, detectorPoint, type DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { weightedSpectrum } from '@/lib/engine/routes/a/weighted-spectrum';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { houseCosmology, luminosityDistanceMpc, timeDilatedVolumeMpc3 } from '@/lib/engine/units/cosmology';
import { horizonOf, horizonAgain } from './horizon';
import { loudness } from './loudness';
import { ROUNDING_FLOOR, type Evaluated, type Recipe } from './recipe';

const relativeFloor = (value: number): number => ROUNDING_FLOOR * Math.abs(value);

const PEAK_POINTS = 2000;

/** Where dρ²/d ln f is largest, by a parabola through the three highest of 2000 log-spaced frequencies. */
function spectrumPeakHz({ a, band, response, average }: DetectorPoint, store: SpectrumStore): number | null {
  const step = Math.log(band.fHighHz / band.fLowHz) / (PEAK_POINTS - 1);
  const f = Array.from({ length: PEAK_POINTS }, (_, i) => band.fLowHz * Math.exp(i * step));
  const heights = weightedSpectrum(a, band, average === 'optimal' ? response : 'complex', f, store).map((v) => v ?? 0);
  const top = heights.reduce((best, v, i) => (v > heights[best]! ? i : best), 0);
  if (!(heights[top]! > 0)) return null;
  if (top === 0 || top === PEAK_POINTS - 1) return f[top]!;
  const [l, m, r] = [heights[top - 1]!, heights[top]!, heights[top + 1]!];
  const bend = l - 2 * m + r;
  return f[top]! * Math.exp(bend < 0 ? (step * (l - r)) / (2 * bend) : 0);
}

export const snrRecipe: Recipe = {
  traits: () => ({ maximise: null, loudness: true, absolute: true, needsDistance: true, horizon: false }),
  evaluate: ({ route }, request) => {
    const point = detectorPoint(request);
    return { value: loudness(route, point.a, point) };
  },
  again: (kit, request) => snrRecipe.evaluate(kit, request).value,
  alsoShown: (request, store) => ({ spectrumPeakHz: spectrumPeakHz(detectorPoint(request), store) }),
  floor: relativeFloor,
  snrLike: true,
  shownPoint: detectorPoint,
};

/** Ratios are taken at one distance; where none is known, both stand at 1000 Mpc. */
function loudnessPair(kit: Parameters<Recipe['evaluate']>[0], point: DetectorPoint): { rhoA: number; rhoB: number } {
  return { rhoA: loudness(kit.route, point.a, point), rhoB: loudness(kit.route, point.b ?? point.a, point) };
}

const ratioTraits = () => ({ maximise: null, loudness: true, absolute: false, needsDistance: false, horizon: false }) as const;

/** "At equal M, D": that of the redshift if one is declared; physical strains of different own distances are brought to one. */
function atOneDistance(request: Parameters<Recipe['evaluate']>[1]): Parameters<Recipe['evaluate']>[1] {
  const { declared, a, b } = request;
  if (declared.distanceMpc !== undefined) return request;
  const own = [a.given.ownDistanceMpc, b?.given.ownDistanceMpc ?? null];
  const known = own.every((d) => d !== null) ? own[0]! : own.some((d) => d !== null) ? null : ANY_DISTANCE_MPC;
  if (known === null) return request;
  const { redshift = 0, cosmology = houseCosmology } = declared;
  return { ...request, declared: { ...declared, distanceMpc: redshift > 0 ? luminosityDistanceMpc(redshift, cosmology) : known } };
}

export const snrRatioRecipe: Recipe = {
  traits: ratioTraits,
  evaluate: (kit, request) => {
    const { rhoA, rhoB } = loudnessPair(kit, detectorPoint(atOneDistance(request)));
    return { value: rhoA / rhoB, components: { rhoA, rhoB } };
  },
  again: (kit, request) => snrRatioRecipe.evaluate(kit, request).value,
  floor: relativeFloor,
  snrLike: false,
  shownPoint: detectorPoint,
};

const isComoving = (declared: DeclaredSettings): boolean => declared.rateLaw === 'comoving';

/** Horizons of both waveforms by themselves, as one role each. */
function comovingVolumes(
  kit: Parameters<Recipe['evaluate']>[0],
  request: Parameters<Recipe['evaluate']>[1],
  near?: readonly number[],
): { volumes: number[]; redshifts: number[] } {
  const declared = { ...request.declared, average: 'optimal' as const };
  const { cosmology } = detectorPoint(request);
  const roles = [request.a, request.b ?? request.a].map((a) => ({ ...request, declared, a, b: null }));
  const redshifts = roles.map((role, i) =>
    near === undefined ? horizonOf(kit, role).redshift : horizonAgain(kit, role, near[i]!).redshift,
  );
  return { volumes: redshifts.map((z) => timeDilatedVolumeMpc3(z, cosmology)), redshifts };
}

export const volumeRatioRecipe: Recipe = {
  traits: (declared) => ({ ...ratioTraits(), absolute: isComoving(declared), horizon: isComoving(declared), inRedshift: isComoving(declared) }),
  evaluate: (kit, request): Evaluated => {
    const { rhoA, rhoB } = loudnessPair(kit, detectorPoint(atOneDistance(request)));
    const ratio = rhoA / rhoB;
    if (!isComoving(request.declared)) return { value: ratio ** 3, components: { ratio } };
    const { volumes, redshifts } = comovingVolumes(kit, request);
    return {
      value: volumes[0]! / volumes[1]!,
      components: { ratio, redshiftA: redshifts[0]!, redshiftB: redshifts[1]! },
      roots: redshifts,
    };
  },
  again: (kit, request, found) => {
    if (!isComoving(request.declared)) return volumeRatioRecipe.evaluate(kit, request).value;
    const { volumes } = comovingVolumes(kit, request, found.roots);
    return volumes[0]! / volumes[1]!;
  },
  floor: relativeFloor,
  snrLike: false,
  shownPoint: detectorPoint,
};
