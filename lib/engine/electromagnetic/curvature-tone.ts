import type { ModeIndex } from '../contract/settings';
import { derivativesAtSamples } from '../radiation/local-calculus';
import type { RadiationRecord } from '../radiation/radiation-record';
import { derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline } from '../routes/b/banded-spline';
import { toneOfMode, type Tone } from '../tones/tone';

/** ψ₄ of one mode as each route has it. */
export interface CurvatureTones {
  readonly A: Tone;
  /** Route A with shorter differences; the same as A where nothing was differentiated. */
  readonly coarse: Tone;
  readonly B: Tone;
  /** Largest factor by which a relative slip of a printed sample grows between two times. */
  readonly gain: (from: number, to: number) => number;
}

const derivativesTo = { strain: 2, news: 1, psi4: 0 } as const;

interface Differenced {
  readonly tone: Tone;
  readonly noise: Float64Array;
}

function differenced({ tone, noise }: Differenced, points: number): Differenced {
  const { slopes, noiseGain } = derivativesAtSamples(tone.axis, [tone.re, tone.im], points, tone.isEven);
  return { tone: { ...tone, re: slopes[0]!, im: slopes[1]! }, noise: noise.map((x, i) => x * noiseGain[i]!) };
}

function onSamples(given: Tone, order: number, points: number): Differenced {
  let at: Differenced = { tone: given, noise: given.re.map((x, i) => Math.hypot(x, given.im[i]!)) };
  for (let k = 0; k < order; k++) at = differenced(at, points);
  return at;
}

function onSplines(given: Tone, order: number): Tone {
  if (order === 0) return given;
  const basis = splineBasis(given.axis);
  const down = (spline: Spline, k: number): Spline => (k === 0 ? spline : down(derivativeOf(spline), k - 1));
  const [re, im] = evaluateSplines([fitSpline(basis, given.re), fitSpline(basis, given.im)].map((spline) => down(spline, order)), given.axis);
  return { ...given, re: re!, im: im! };
}

/**
 * ψ₄ of one mode by both routes: as it stands, or from news and strain by differences (A) and by splines (B).
 * Shape:  three tones on the file's own times; null when the record has no such mode.
 * Units:  M and r·M·ψ₄.
 * Error:  13-point differences, splines of degree 7.
 * Fails:  null.
 * Source: ψ₄ = d²H/dt² in the house convention.
 */
export function curvatureTones(record: RadiationRecord, mode: ModeIndex): CurvatureTones | null {
  const given = toneOfMode(record, mode);
  if (given === null) return null;
  const order = derivativesTo[record.variable];
  const house = onSamples(given, order, 13);
  const gain = (from: number, to: number): number => {
    const { axis, re, im } = house.tone;
    let most = 0;
    for (let i = 0; i < axis.length; i++) if (axis[i]! >= from && axis[i]! <= to) most = Math.max(most, house.noise[i]! / Math.hypot(re[i]!, im[i]!));
    return most;
  };
  return { A: house.tone, coarse: order === 0 ? house.tone : onSamples(given, order, 9).tone, B: onSplines(given, order), gain };
}
