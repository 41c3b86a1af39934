import type { Mode } from '@/lib/engine/contract/waveform';
import { modePhase, peakAmplitude22, relativeAmplitude, riseToPeak } from './amplitudes';
import { binaryOf, type Binary, type BinaryParameters } from './binary';
import { integrateInspiral, orbitalDecay } from './inspiral';
import { amplitudePeak, mergerFrequency, type HandOver, type MergerFrequency } from './merger-frequency';
import { fittedQuasiNormal, tabulatedQuasiNormal, type TabulatedMode } from '../remnant/quasi-normal';
import { husaRadiatedEnergy, husaSpin } from '../remnant/husa-2016';

export interface SynthesisRequest extends BinaryParameters {
  /** Orbital MΩ at the first sample. */
  readonly mOmega0: number;
  readonly stepM: number;
  /** Modes with m > 0; each brings its mirror H_{ℓ,−m} = (−1)^ℓ H*_{ℓm}. */
  readonly modes?: readonly TabulatedMode[];
  /** Tones of the remnant: published fits (default) or the more exact table; see content/decisions. */
  readonly tones?: 'fits' | 'table';
}

export interface SyntheticWaveform {
  /** Times in M from 0, uniform. */
  readonly t: Float64Array;
  /** rh/M, each mode followed by its mirror. */
  readonly modes: readonly Mode[];
  readonly remnantMass: number;
  readonly remnantSpin: number;
}

export const allModes: readonly TabulatedMode[] = ['22', '21', '33', '44', '32'];
const handOverOmega = 0.085;
const ringdownM = 150;

interface Inspiral extends HandOver {
  readonly x: Float64Array;
  readonly stepM: number;
  readonly decay: (x: number) => number;
}

/**
 * Closed-form inspiral–merger–ringdown modes of an aligned-spin binary.
 * Shape:  one uniform time axis, every mode parallel to it.
 * Units:  t in M from 0, samples rh/M in the house convention (H22 ∝ e^{−iφ}, φ(0) = 0).
 * Error:  phase by an end-corrected trapezoid, fourth order in the step; the model itself is stylised.
 * Fails:  throws on parameters outside the model (massRatio < 1, |χ| > 1, mOmega0 outside 0…0.085).
 * Source: domain reference, appendix B.
 */
export function synthesise(request: SynthesisRequest): SyntheticWaveform {
  checkRequest(request);
  const binary = binaryOf(request);
  const mass = 1 - husaRadiatedEnergy(binary);
  const spin = husaSpin(binary);
  const inspiral = inspiralOf(binary, request);
  const tone = request.tones === 'table' ? tabulatedQuasiNormal : fittedQuasiNormal;
  const frequencies = (mode: TabulatedMode): MergerFrequency => {
    const { real, imag } = tone(mode, spin);
    return mergerFrequency(inspiral, real / mass / Number(mode[1]), mass / imag);
  };
  const dominant = frequencies('22');
  const n = inspiral.x.length + Math.trunc((dominant.tp - inspiral.t0 + ringdownM) / request.stepM);
  const t = Float64Array.from({ length: n }, (_, i) => i * request.stepM);
  const peakX = Math.cbrt(dominant.omega(dominant.tp)) ** 2;
  const modes = (request.modes ?? allModes).flatMap((mode) => {
    const merger = frequencies(mode);
    const amplitude = amplitudeAlong(mode, binary, inspiral, merger, peakX);
    return withMirror(mode, t, phaseAlong(t, inspiral, merger), amplitude);
  });
  return { t, modes, remnantMass: mass, remnantSpin: spin };
}

function checkRequest({ massRatio, chi1z, chi2z, mOmega0, stepM }: SynthesisRequest): void {
  const inside = massRatio >= 1 && Math.abs(chi1z) <= 1 && Math.abs(chi2z) <= 1 && mOmega0 > 0 && mOmega0 < handOverOmega && stepM > 0;
  if (!inside) throw new RangeError(`no synthesis for ${JSON.stringify({ massRatio, chi1z, chi2z, mOmega0, stepM })}`);
}

function inspiralOf(binary: Binary, { mOmega0, stepM }: SynthesisRequest): Inspiral {
  const decay = orbitalDecay(binary);
  const x = integrateInspiral(decay, Math.cbrt(mOmega0) ** 2, Math.cbrt(handOverOmega) ** 2, stepM);
  const last = x[x.length - 1]!;
  return { x, stepM, decay, t0: (x.length - 1) * stepM, omega0: last * Math.sqrt(last), omegaDot0: 1.5 * Math.sqrt(last) * decay(last) };
}

/** Orbital phase of a mode: trapezoid with the end correction −h²/12·[Ω̇], both pieces being known in closed form. */
function phaseAlong(t: Float64Array, inspiral: Inspiral, merger: MergerFrequency): Float64Array {
  const { x, stepM: h, decay } = inspiral;
  const phase = new Float64Array(t.length);
  let omega = 0;
  let rate = 0;
  for (let i = 0; i < t.length; i++) {
    const inspiralling = i < x.length;
    const root = inspiralling ? Math.sqrt(x[i]!) : 0;
    const nextOmega = inspiralling ? root ** 3 : merger.omega(t[i]!);
    const nextRate = inspiralling ? 1.5 * root * decay(x[i]!) : merger.omegaDot(t[i]!);
    if (i > 0) phase[i] = phase[i - 1]! + (h / 2) * (omega + nextOmega) - ((h * h) / 12) * (nextRate - rate);
    omega = nextOmega;
    rate = nextRate;
  }
  return phase;
}

/** Real amplitude at sample i (time t), sign included; zero for modes that symmetry forbids. */
function amplitudeAlong(
  mode: TabulatedMode,
  binary: Binary,
  inspiral: Inspiral,
  merger: MergerFrequency,
  peakX: number,
): (i: number, t: number) => number {
  const relative = relativeAmplitude(mode, binary);
  const value = (x: number) => 8 * Math.sqrt(Math.PI / 5) * binary.eta * x * relative(x);
  const { x, t0, decay } = inspiral;
  const lastX = x[x.length - 1]!;
  const tPeak = amplitudePeak(merger, t0);
  const peak = peakAmplitude22(binary.eta) * (mode === '22' ? 1 : relative(peakX));
  if (Math.abs(peak) < 1e-14) return () => 0;
  const dx = 1e-4 * lastX;
  const slope = ((value(lastX + dx) - value(lastX - dx)) / (2 * dx)) * decay(lastX);
  const rise = riseToPeak({ t: t0, value: value(lastX), slope }, { t: tPeak, value: peak });
  const shape = (t: number) => merger.omega(t) ** -1.5 / Math.cosh((t - merger.tp) / merger.tau);
  const shapeAtPeak = shape(tPeak);
  return (i, t) => (i < x.length ? value(x[i]!) : t < tPeak ? rise(t) : (peak * shape(t)) / shapeAtPeak);
}

function withMirror(name: TabulatedMode, t: Float64Array, phase: Float64Array, amplitude: (i: number, t: number) => number): Mode[] {
  const l = Number(name[0]);
  const m = Number(name[1]);
  const [pr, pi] = modePhase[name];
  const re = new Float64Array(t.length);
  const im = new Float64Array(t.length);
  for (let i = 0; i < t.length; i++) {
    const a = amplitude(i, t[i]!);
    const c = a * Math.cos(m * phase[i]!);
    const s = -a * Math.sin(m * phase[i]!);
    re[i] = pr * c - pi * s;
    im[i] = pr * s + pi * c;
  }
  const sign = l % 2 === 0 ? 1 : -1;
  return [
    { l, m, re, im },
    { l, m: -m, re: re.map((x) => sign * x), im: im.map((x) => -sign * x) },
  ];
}
