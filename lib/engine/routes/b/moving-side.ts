import type { MatchRequest, Side } from '../../contract/route';
import type { Response } from '../../contract/settings';
import { spinWeightedHarmonic } from '../../modes/spin-weighted-harmonic';
import { channelsOf, type Channel } from './channels';
import { addRotated, emptySpectrum, type ModeSpectrum, type Source, type Spectrum } from './spectrum';

/** Where b stands in the search: factor on its mass, and its line of sight. */
export interface Pose {
  readonly massFactor: number;
  readonly inclinationRad: number;
  readonly azimuthRad: number;
}

/** What may vary in b besides its shift. */
export interface Freedom {
  readonly time: boolean;
  /** A constant turn of z that the modulus takes care of. */
  readonly turn: boolean;
  readonly azimuth: boolean;
  readonly inclination: boolean;
  readonly mass: boolean;
}

/** Rule 2.7: what each name of `maximise` means for this response and this content. */
export function freedomOf(request: MatchRequest): Freedom {
  const asked = new Set(request.maximise);
  const isModes = request.b.waveform.content.kind === 'modes';
  const isComplex = request.response === 'complex';
  const constantPhase = asked.has('phase') && !(isComplex && isModes);
  return {
    time: asked.has('time'),
    turn: constantPhase || (isComplex && asked.has('polarisation')),
    azimuth: asked.has('phase') && isComplex && isModes,
    inclination: asked.has('inclination') && isModes,
    mass: asked.has('templateMass'),
  };
}

/** b at a pose, as channels on the nodes. */
export type Posed = (pose: Pose) => { readonly source: Source; readonly channels: readonly Channel[] };

function sumOverModes(modes: readonly ModeSpectrum[], inclinationRad: number, azimuthRad: number, n: number): Spectrum {
  const total = emptySpectrum(n);
  for (const { l, m, spectrum } of modes) {
    const y = spinWeightedHarmonic(l, m, inclinationRad, azimuthRad);
    addRotated(total, spectrum, y.re, y.im);
  }
  return total;
}

/** One spectrum a value of m, on a fixed inclination: an azimuth only turns each by e^{imφ}. */
function sumByM(modes: readonly ModeSpectrum[], inclinationRad: number, n: number): readonly { m: number; spectrum: Spectrum }[] {
  const orders = [...new Set(modes.map(({ m }) => m))];
  return orders.map((m) => ({ m, spectrum: sumOverModes(modes.filter((mode) => mode.m === m), inclinationRad, 0, n) }));
}

function posedSpectrum(source: Source, side: Side, freedom: Freedom, f: Float64Array): (pose: Pose) => Spectrum {
  if (!freedom.azimuth && !freedom.inclination) {
    const line = source.line(side.inclinationRad, side.azimuthRad, f);
    return () => line;
  }
  const modes = source.modes(f);
  if (freedom.inclination) return (pose) => sumOverModes(modes, pose.inclinationRad, pose.azimuthRad, f.length);
  const byM = sumByM(modes, side.inclinationRad, f.length);
  return (pose) => {
    const total = emptySpectrum(f.length);
    for (const { m, spectrum } of byM) addRotated(total, spectrum, Math.cos(m * pose.azimuthRad), Math.sin(m * pose.azimuthRad));
    return total;
  };
}

/**
 * Prepares b to be read at any pose. Its transforms are taken once a mass; angles only recombine them.
 * Shape:  channels on the nodes f.
 * Units:  strain per Hz.
 * Error:  none beyond the transforms.
 * Fails:  never.
 * Source: settings.md rules 2.2 and 2.7.
 */
export function movingSide(b: Side, rescale: (b: Side, factor: number) => Side, response: Response, freedom: Freedom, f: Float64Array, sourceOf: (side: Side) => Source): Posed {
  let at: { factor: number; source: Source; spectrum: (pose: Pose) => Spectrum } | null = null;
  return (pose) => {
    if (at === null || at.factor !== pose.massFactor) {
      const side = pose.massFactor === 1 ? b : rescale(b, pose.massFactor);
      const source = sourceOf(side);
      at = { factor: pose.massFactor, source, spectrum: posedSpectrum(source, side, freedom, f) };
    }
    return { source: at.source, channels: channelsOf(at.spectrum(pose), response) };
  };
}
