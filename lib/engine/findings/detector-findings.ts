/**
 * Findings: what the data and settings of a claim show before or beside its number, in a
 * physicist's words, with figures and place. They never change a number.
 */
import { houseValues } from '@/lib/engine/contract/house-values';
import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { dominantMode } from '@/lib/engine/conditioning/dominant-mode';
import { nyquistFrequency } from '@/lib/engine/conditioning/nyquist-frequency';
import type { Finding, FindingLevel } from '@/lib/engine/contract/finding';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Side } from '@/lib/engine/contract/route';
import { lateDecay } from './late-decay';
import { short } from './spelt';


/** The mass that names a point, where it has one. */
const massOf = (point: DetectorPoint): string | null => (point.massMsun === null ? null : `${short(point.massMsun, 6)} M☉`);

/** A band edge a hair outside the curve (relative 1e-9) counts as its end. */
const EDGE_ALLOWANCE = 1e-9;

/** V18. Nothing is extrapolated. */
export function bandBeyondCurve(point: DetectorPoint): Finding | null {
  const { noise, fLowHz, fHighHz } = point.band;
  const base = { code: 'engine/band-beyond-curve', level: 'stops-lodging', where: noise.name } as const;
  const low = fLowHz < noise.fLowHz * (1 - EDGE_ALLOWANCE);
  const high = fHighHz > noise.fHighHz * (1 + EDGE_ALLOWANCE);
  if (low) {
    const text = `The noise curve ${noise.name} starts at ${short(noise.fLowHz, 6)} Hz; the claim integrates from ${short(fLowHz, 6)} Hz. Nothing is extrapolated.`;
    return { ...base, text, fix: `Set fLowHz to ${short(noise.fLowHz, 6)} Hz or more, or attach a curve that reaches lower.` };
  }
  if (!high) return null;
  const text = `The noise curve ${noise.name} ends at ${short(noise.fHighHz, 6)} Hz; the claim integrates to ${short(fHighHz, 6)} Hz. Nothing is extrapolated.`;
  return { ...base, text, fix: `Set fHighHz to ${short(noise.fHighHz, 6)} Hz or less, or attach a curve that reaches higher.` };
}

/** V19, what stops: read again here, so that a curve from anywhere fails closed. */
export function curveInvalid(noise: NoiseCurve): Finding | null {
  const bad = (text: string): Finding => ({
    code: 'engine/curve-invalid',
    level: 'stops-lodging',
    where: noise.name,
    text,
    fix: 'Correct the curve or attach another one.',
  });
  if (!(noise.fHighHz > noise.fLowHz && noise.fLowHz > 0))
    return bad(`The noise curve ${noise.name} covers ${noise.fLowHz} to ${noise.fHighHz} Hz; that is no band.`);
  const points = noise.points ?? Float64Array.of(noise.fLowHz, noise.fHighHz);
  for (let i = 0; i < points.length; i++) {
    const s = noise.psd(points[i]!);
    if (i > 0 && !(points[i]! > points[i - 1]!))
      return bad(`The frequency of ${noise.name} goes from ${points[i - 1]} to ${points[i]} Hz; it must rise.`);
    if (!(s > 0) || !Number.isFinite(s)) return bad(`The noise curve ${noise.name} is ${s} at ${points[i]} Hz; it must be positive.`);
  }
  return null;
}

export function averageTwice(point: DetectorPoint): Finding | null {
  const { noise } = point.band;
  if (point.average === 'optimal' || !noise.alreadyAveraged) return null;
  return {
    code: 'engine/curve-already-averaged',
    level: 'stops-lodging',
    where: noise.name,
    text: `The curve ${noise.name} contains the average over the sky already; the claim asks for the average "${point.average}" on top of it.`,
    fix: 'Leave out "average", or name a curve of the instrument alone.',
  };
}

/** Averages over orientation need to know how the signal changes with it. */
export function averageWithoutModes(point: DetectorPoint, waveforms: readonly ConditionedWaveform[]): Finding | null {
  const { average } = point;
  if (average !== 'sky-orientation' && average !== 'volume') return null;
  const flat = waveforms.find((c) => c.given.content.kind !== 'modes');
  if (!flat) return null;
  return {
    code: 'engine/average-needs-modes',
    level: 'stops-lodging',
    where: flat.given.name,
    text: `${flat.given.name} is the strain along one line of sight; the average "${average}" needs its modes.`,
    fix: 'Attach the modes, or claim the average "sky" at this line of sight.',
  };
}

export const noSignal = (name: string, why: string): Finding => ({
  code: 'engine/no-signal',
  level: 'stops-lodging',
  where: name,
  text: `${name} has no signal ${why}.`,
  fix: 'Check the modes, the response, the line of sight and the band of the claim.',
});

/** Smaller than this part of the strongest mode, a line of sight sees rounding only. */
const NOTHING = 1e-12;

/** A line of sight that no mode reaches, or columns of zeros. */
export function nothingSeen(c: ConditionedWaveform, side: Side, weigh: (l: number, m: number) => number, allSky: boolean): Finding | null {
  const { content } = side.waveform;
  if (content.kind === 'line-of-sight') {
    const empty =
      content.plus.every((x) => x === 0) &&
      (content.cross?.every((x) => x === 0) ?? true) &&
      (content.plusIm?.every((x) => x === 0) ?? true) &&
      (content.crossIm?.every((x) => x === 0) ?? true);
    return empty ? noSignal(c.given.name, 'at all: its columns are zero') : null;
  }
  const peaks = content.modes.map((mode) => c.peakOf(mode));
  const top = Math.max(0, ...peaks);
  if (!(top > 0)) return noSignal(c.given.name, 'in the modes in use');
  const seen = Math.max(0, ...content.modes.map((mode, i) => weigh(mode.l, mode.m) * peaks[i]!));
  if (allSky || seen > NOTHING * top) return null;
  return noSignal(c.given.name, `along the line of sight ι = ${short(side.inclinationRad, 6)} rad`);
}

export function negativeMAssumed(c: ConditionedWaveform): Finding | null {
  if (!c.mirrorAssumed) return null;
  return {
    code: 'engine/negative-m-assumed',
    level: 'needs-answer',
    where: c.given.name,
    text: `${c.given.name} gives no modes with m < 0 and does not say what becomes of them. We mirrored the others, H(l,−m) = (−1)^l H*(l,m), as for a binary that is symmetric about its orbital plane.`,
    fix: 'Declare negativeM: "mirror", "given" or "none".',
  };
}

export function modesMissing(c: ConditionedWaveform): Finding | null {
  if (c.missing.length === 0) return null;
  const list = c.missing.map(([l, m]) => `(${l},${m})`).join(', ');
  return {
    code: 'engine/modes-missing',
    level: 'worth-a-look',
    where: c.given.name,
    text: `The claim lists ${list}, which ${c.given.name} does not have; the others were used.`,
    fix: 'Attach these modes or leave them out of the claim.',
  };
}

interface Affected {
  readonly point: DetectorPoint;
  readonly side: Side;
}

const pointsWord = (affected: readonly Affected[]): string => {
  const masses = [...new Set(affected.map(({ point }) => massOf(point)).filter((mass) => mass !== null))];
  if (masses.length === 0) return affected.length > 1 ? `At ${affected.length} of the claimed points` : 'Here';
  const shown = masses.slice(0, 4).join(', ');
  return `At ${shown}${masses.length > 4 ? ` and ${masses.length - 4} more masses` : ''}`;
};

/** Cycles per unit of the axis where the start ramp ends; a frequency-domain file starts at its first frequency. */
export function startFrequency(c: ConditionedWaveform, point: DetectorPoint): number | null {
  if (c.given.domain === 'frequency') return c.given.axis[0]!;
  return c.taper(point.declared.taper ?? houseValues.taper, point.declared.lMax ?? null).frequencyAtRampEnd;
}

export const startsInBand = (c: ConditionedWaveform, point: DetectorPoint, side: Side): boolean => {
  const start = startFrequency(c, point);
  return start !== null && start / side.secondsPerUnit > point.band.fLowHz * (1 + EDGE_ALLOWANCE);
};

/** V07. The level differs: a match of cut signals is a match of the cut signals; a cut loudness is a lower bound. */
export function signalStartsInBand(c: ConditionedWaveform, points: readonly Affected[], level: FindingLevel): Finding | null {
  const affected = points.filter(({ point, side }) => startsInBand(c, point, side));
  const worst = affected.reduce<Affected | undefined>(
    (p, q) => (p === undefined || q.side.secondsPerUnit < p.side.secondsPerUnit ? q : p),
    undefined,
  );
  if (worst === undefined) return null;
  const startHz = startFrequency(c, worst.point)! / worst.side.secondsPerUnit;
  const { fLowHz } = worst.point.band;
  const mass = worst.point.massMsun;
  const least = mass === null ? null : (mass * startHz) / fLowHz;
  const where = affected.length > 1 && massOf(worst.point) ? ` (at ${massOf(worst.point)})` : '';
  return {
    code: 'engine/signal-starts-in-band',
    level,
    where: c.given.name,
    text: `${pointsWord(affected)} ${c.given.name} comes in at ${short(startHz)} Hz${where}, but the claim integrates from ${short(fLowHz, 6)} Hz.${least === null ? '' : ` The smallest mass whose signal fills the band is ${short(least)} M☉.`}`,
    fix: `Raise fLowHz to ${short(startHz)} Hz, ${least === null ? '' : 'restrict the claim to heavier systems, '}or attach a longer waveform.`,
  };
}

/** V08. The first cycle is below the band but the ramp's end is not, or the record is shorter than its ramps. */
export function taperRoom(c: ConditionedWaveform, points: readonly Affected[]): Finding | null {
  const base = { code: 'engine/taper-room', level: 'worth-a-look', where: c.given.name } as const;
  const measured = points.map(({ point, side }) => ({
    point,
    side,
    taper: c.taper(point.declared.taper ?? houseValues.taper, point.declared.lMax ?? null),
  }));
  if (measured.some(({ taper }) => taper.tooShort)) {
    return {
      ...base,
      text: `${c.given.name} is shorter than the ramps of its taper (two cycles at an open start, one at an open end); the taper covers the whole record.`,
      fix: 'Attach a longer record, or declare a shorter taper.',
    };
  }
  const cramped = measured.filter(({ point, side, taper }) => {
    const { frequencyAtStart: first, frequencyAtRampEnd: full } = taper;
    const low = point.band.fLowHz * side.secondsPerUnit;
    return taper.window.start !== null && first !== null && full !== null && first < low && low < full;
  });
  const worst = cramped[0];
  if (worst === undefined) return null;
  const { frequencyAtStart: first, frequencyAtRampEnd: full } = worst.taper;
  const low = worst.point.band.fLowHz * worst.side.secondsPerUnit;
  const ramp = worst.point.declared.taper;
  const cycles = (2 * (typeof ramp === 'number' ? ramp : 1) * (low - first!)) / (full! - first!);
  return {
    ...base,
    text: `${pointsWord(cramped)} only about ${short(cycles, 2)} cycle${cycles < 1.05 && cycles > 0.95 ? '' : 's'} of ${c.given.name} lie below ${short(worst.point.band.fLowHz, 6)} Hz: the start ramp of the taper reaches into the band.`,
    fix: 'Raise fLowHz, or attach a waveform that starts earlier.',
  };
}

/** Rule 2.5: a declared edge above what the samples carry counts content there as zero. */
export function bandBeyondSampling(c: ConditionedWaveform, points: readonly Affected[]): Finding | null {
  const topHz = ({ side }: Affected): number => nyquistFrequency(c.given) / side.secondsPerUnit;
  const affected = points.filter(
    (p) => p.point.declared.fHighHz !== undefined && p.point.declared.fHighHz > topHz(p) * (1 + EDGE_ALLOWANCE),
  );
  const worst = affected.reduce<Affected | undefined>((p, q) => (p === undefined || topHz(q) < topHz(p) ? q : p), undefined);
  if (worst === undefined) return null;
  const carries = c.given.domain === 'frequency' ? 'holds frequencies' : 'is sampled finely enough for frequencies';
  return {
    code: 'engine/band-beyond-sampling',
    level: 'worth-a-look',
    where: c.given.name,
    text: `${pointsWord(affected)} ${c.given.name} ${carries} up to ${short(topHz(worst))} Hz only, and the claim integrates to ${short(worst.point.declared.fHighHz!, 6)} Hz. What lies above counts as zero.`,
    fix: `Lower fHighHz to ${short(topHz(worst))} Hz, or attach a finer record.`,
  };
}

const FEW_SAMPLES = 4;

/** The ringdown of the loudest mode in use: cycles per unit of the axis, and the highest frequency that the samples there carry. */
function ringOf(c: ConditionedWaveform, lMax: number | null): { readonly frequency: number; readonly carried: number } | null {
  const { content, axis, domain } = c.used(lMax);
  if (domain !== 'time') return null;
  const loudest = content.kind === 'modes' ? dominantMode(content.modes) : undefined;
  const sight = content.kind === 'line-of-sight' && content.cross !== null ? { re: content.plus, im: content.cross } : undefined;
  const series = loudest ?? sight;
  const decay = series === undefined ? null : lateDecay(axis, series.re, series.im);
  if (decay?.turning == null) return null;
  const i = decay.peakIndex;
  return { frequency: decay.turning / (2 * Math.PI), carried: 0.5 / (axis[i + 1]! - axis[i]!) };
}

/** V05: a ringdown inside the band with fewer than four samples to its period. */
export function ringBeyondSampling(c: ConditionedWaveform, points: readonly Affected[]): Finding | null {
  const ring = ringOf(c, points[0]?.point.declared.lMax ?? null);
  if (ring === null || ring.frequency * FEW_SAMPLES <= 2 * ring.carried) return null;
  const inBand = points.filter(({ point, side }) => ring.frequency / side.secondsPerUnit > point.band.fLowHz);
  const worst = inBand.reduce<Affected | undefined>((p, q) => (p === undefined || q.side.secondsPerUnit < p.side.secondsPerUnit ? q : p), undefined);
  if (worst === undefined) return null;
  const { secondsPerUnit } = worst.side;
  return {
    code: 'engine/band-beyond-sampling',
    level: 'worth-a-look',
    where: c.given.name,
    text: `${pointsWord(inBand)} the ringdown of ${c.given.name} is at ${short(ring.frequency / secondsPerUnit)} Hz, and its samples carry frequencies to ${short(ring.carried / secondsPerUnit)} Hz: ${short((2 * ring.carried) / ring.frequency, 2)} samples to a period. What the ringdown adds is uncertain.`,
    fix: 'Attach the record with a smaller step around the merger.',
  };
}

export function severalRoots(name: string, roots: readonly number[]): Finding | null {
  if (roots.length < 2) return null;
  return {
    code: 'engine/several-roots',
    level: 'worth-a-look',
    where: name,
    text: `The loudness of ${name} crosses the threshold at ${roots.length} redshifts: ${roots.map((z) => short(z, 4)).join(', ')}. The farthest is the horizon; between the others the source is not seen everywhere.`,
  };
}

export const noHorizon = (name: string, threshold: number): Finding => ({
  code: 'engine/no-horizon',
  level: 'stops-lodging',
  where: name,
  text: `Between z = 0.001 and 50 the loudness of ${name} does not cross ${short(threshold, 6)}.`,
  fix: 'Check the mass, the threshold and the band of the claim.',
});
