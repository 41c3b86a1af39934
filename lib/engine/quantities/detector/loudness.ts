import type { Average, DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Band, DetectorRoute, ResponseGram, Side } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';

/** ρ² in one response from ⟨h₊|h₊⟩, ⟨h×|h×⟩, ⟨h₊|h×⟩. */
export function powerInResponse({ plusPlus, crossCross, plusCross }: ResponseGram, response: Response): number {
  if (response === 'plus') return plusPlus;
  if (response === 'cross') return crossCross;
  if (response === 'complex') return plusPlus + crossCross;
  const { plus, cross } = response;
  return Math.max(0, plus * plus * plusPlus + cross * cross * crossCross + 2 * plus * cross * plusCross);
}

/** ⟨(F₊² + F×²)^{3/2}⟩ over the sky for one detector with arms at 90°; trapezoid in φ, Simpson in cos θ. */
const antennaCube: number = (() => {
  const [rows, columns] = [2000, 64];
  let sum = 0;
  for (let i = 0; i <= rows; i++) {
    const c = i / rows;
    const weight = (i === 0 || i === rows ? 1 : i % 2 === 1 ? 4 : 2) / (3 * rows);
    for (let j = 0; j < columns; j++) {
      const phi = (Math.PI * (j + 0.5)) / columns;
      const a = 0.5 * (1 + c * c) * Math.cos(2 * phi);
      const b = c * Math.sin(2 * phi);
      sum += (weight * (a * a + b * b) ** 1.5) / columns;
    }
  }
  return sum;
})();

const POLARISATION_STEPS = 256;

/** ⟨ρ³⟩ over the polarisation angle of a signal with this gram, for |F| = 1. */
function cubeOverPolarisation({ plusPlus, crossCross, plusCross }: ResponseGram): number {
  const mean = (plusPlus + crossCross) / 2;
  const swing = Math.hypot((plusPlus - crossCross) / 2, plusCross);
  let sum = 0;
  for (let i = 0; i < POLARISATION_STEPS; i++)
    sum += Math.max(0, mean + swing * Math.cos((2 * Math.PI * (i + 0.5)) / POLARISATION_STEPS)) ** 1.5;
  return sum / POLARISATION_STEPS;
}

interface Sight {
  readonly inclinationRad: number;
  readonly azimuthRad: number;
  readonly weight: number;
}

/** Gauss–Legendre nodes and weights on [−1, 1] by Newton on the Legendre polynomial. */
export function legendreRule(n: number): { x: number; w: number }[] {
  return Array.from({ length: n }, (_, i) => {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let round = 0; round < 100; round++) {
      let [p, q] = [1, 0];
      for (let k = 0; k < n; k++) [p, q] = [((2 * k + 1) * x * p - k * q) / (k + 1), p];
      slope = (n * (x * p - q)) / (x * x - 1);
      const step = p / slope;
      x -= step;
      if (Math.abs(step) < 1e-15) break;
    }
    return { x, w: 2 / ((1 - x * x) * slope * slope) };
  });
}

/** Lines of sight whose weighted mean of ρ³ is the mean over the sphere, by the highest ℓ and |m| in use. */
function sightsFor(side: Side): Sight[] {
  const { content } = side.waveform;
  const modes = content.kind === 'modes' ? content.modes : [];
  const lTop = Math.max(2, ...modes.map((mode) => mode.l));
  const sizes = new Set(modes.map((mode) => Math.abs(mode.m)));
  // With one |m| a change of azimuth only turns or shifts the signal, and no SNR depends on it.
  const azimuths = sizes.size <= 1 ? 1 : 4 * Math.max(...sizes);
  return legendreRule(8 + 4 * lTop).flatMap(({ x, w }) =>
    Array.from({ length: azimuths }, (_, j) => ({
      inclinationRad: Math.acos(x),
      azimuthRad: (2 * Math.PI * j) / azimuths,
      weight: w / 2 / azimuths,
    })),
  );
}

function volumeAverage(route: DetectorRoute, side: Side, band: Band): number {
  const sights = sightsFor(side);
  const grams = route.grams ? route.grams(side, band, sights) : sights.map((sight) => route.gram({ ...side, ...sight }, band));
  const mean = sights.reduce((sum, sight, i) => sum + sight.weight * cubeOverPolarisation(grams[i]!), 0);
  return Math.cbrt(antennaCube * mean);
}

function averaged(route: DetectorRoute, side: Side, band: Band, response: Response, average: Average): number {
  if (average === 'sky-orientation') return Math.sqrt(route.modePower(side, band) / (20 * Math.PI));
  if (average === 'volume') return volumeAverage(route, side, band);
  const gram = route.gram(side, band);
  if (average === 'sky') return Math.sqrt((gram.plusPlus + gram.crossCross) / 5);
  return Math.sqrt(powerInResponse(gram, response));
}

/**
 * Optimal-filter loudness of one side with the claim's average, number of detectors and arm angle.
 * Shape:  scalar.
 * Units:  dimensionless; strain as the side scales it.
 * Error:  that of the route; angular means to 1e-7 (volume: the cube is not a polynomial in the angles).
 * Fails:  NaN for averages over orientation of a signal without modes.
 * Source: settings.md rule 2.8; ⟨F₊²⟩ = 1/5.
 */
export function loudness(route: DetectorRoute, side: Side, point: DetectorPoint): number {
  const { band, response, average, detectors, armAngleDeg } = point;
  return Math.sqrt(detectors) * Math.sin((armAngleDeg * Math.PI) / 180) * averaged(route, side, band, response, average);
}
