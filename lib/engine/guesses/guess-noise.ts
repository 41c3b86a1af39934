import { isNamed, pointsAgainst, SAME } from '../noise/beside-built-in';
import { builtInCurves } from '../noise/built-in-curves';
import { shapeBeside } from '../noise/curve-shape';
import { short } from '../findings/spelt';
import type { Guess } from './guess';
import { fitCurve, readAs, sizeAndSlope, thinned, type CurveFit, type NoiseColumn, type NoiseMeaning, type SizeAndSlope } from './noise';

const words: Readonly<Record<NoiseMeaning, string>> = { asd: 'an amplitude density', psd: 'a power density', characteristic: 'a characteristic strain' };
const minus = (text: string): string => text.replace('-', '−');
/** Every detector ends in a rise that its amplitude density follows once, its power density twice. */
const RISES: Readonly<Record<NoiseMeaning, readonly [number, number]>> = { asd: [0.6, 1.25], characteristic: [1.25, 1.75], psd: [1.75, 3] };
/** log₁₀ of amplitudes; of powers it is twice that. From domain reference C01. */
const AMPLITUDES = { ground: [-25, -19.5], space: [-20.5, -15] } as const;

const between = (x: number, [low, high]: readonly [number, number]): boolean => x >= low && x < high;

/** By size alone, and where the highest octave rises as a detector's does, by slope. */
function byDetector({ size, slope, ground }: SizeAndSlope, declared: NoiseMeaning): { readonly meaning: NoiseMeaning; readonly confidence: number } | null {
  const range = AMPLITUDES[ground ? 'ground' : 'space'];
  const risen = (['asd', 'characteristic', 'psd'] as const).find((meaning) => between(slope, RISES[meaning]));
  if (between(size / 2, range)) return { meaning: 'psd', confidence: risen === 'psd' ? 0.9 : 0.7 };
  if (!between(size, range)) return null;
  if (risen === 'asd' || risen === 'characteristic') return { meaning: risen, confidence: risen === 'asd' ? 0.8 : 0.6 };
  // Amplitude density and characteristic strain are alike in size: only their slopes tell them apart.
  return declared === 'psd' ? { meaning: 'asd', confidence: 0.6 } : null;
}

function columnGuess({ name, meaning: declared }: NoiseColumn, meaning: NoiseMeaning, confidence: number, because: string): Guess {
  return { about: 'noise-column', convention: 'C01', declared, proposed: meaning, value: meaning, agrees: meaning === declared, confidence, reason: `${because}: the column of ${name} is ${words[meaning]}.` };
}

function sidedGuess({ name, sided: declared }: NoiseColumn, { power, known, inOctaves }: CurveFit, confidence: number): Guess {
  const sided = power === 0.5 ? 'two' : power === 1 ? 'one' : null;
  const says = sided === 'two' ? 'half of the power of' : sided === 'one' ? 'the whole power of' : 'twice the power of';
  return {
    about: 'sided', convention: 'C02', declared,
    proposed: sided ?? 'neither: each value counts twice',
    value: sided,
    agrees: sided === declared,
    // A match of shape with half the power might also be a better detector of the same kind.
    confidence: power === 1 ? confidence : Math.min(confidence, 0.85),
    reason: `${name} holds ${says} ${known.id} (${known.title}): amplitude densities ${inOctaves}.`,
  };
}

const frequencyGuess = ({ name }: NoiseColumn, { known, inOctaves }: CurveFit, confidence: number): Guess => ({
  about: 'curve-frequency', convention: 'C36', declared: 'f in Hz', proposed: 'ω = 2πf', value: null, agrees: false, confidence,
  reason: `With its first column divided by 2π, ${name} is ${known.id} (${known.title}): amplitude densities ${inOctaves}.`,
});

/** Named after a built-in curve or copying a piece of it, and not the same. */
function versionGuess(column: NoiseColumn): Guess[] {
  const curve = readAs(column, column.meaning);
  const power = column.sided === 'two' ? { ...curve, psd: Float64Array.from(curve.psd, (x) => 2 * x) } : curve;
  const named = builtInCurves.filter((known) => isNamed(power, known));
  for (const known of [...named, ...builtInCurves.filter((other) => !named.includes(other))]) {
    const shape = shapeBeside(pointsAgainst(power, known), named.includes(known));
    if (shape === null) continue;
    return [{
      about: 'curve-version', convention: 'C40', declared: 'as attached',
      proposed: shape.includes('mistyped') ? `${known.id} with a digit slipped` : `another version of ${known.id}`,
      value: null, agrees: false, curve: known.id,
      confidence: named.includes(known) ? 0.8 : 0.6,
      reason: `Beside ${known.id} (${known.title}), ${column.name} ${shape}`,
    }];
  }
  return [];
}

function byFit(column: NoiseColumn, fit: CurveFit): Guess[] {
  const confidence = fit.off <= SAME ? (fit.named ? 0.97 : 0.95) : fit.named ? 0.85 : 0.75;
  const read = columnGuess(column, fit.meaning, confidence, `Read as ${fit.meaning} it is ${fit.known.id} (${fit.known.title}), amplitude densities ${fit.inOctaves}`);
  if (fit.angular) return [...(read.agrees ? [] : [read]), frequencyGuess(column, fit, confidence)];
  const version = read.agrees && fit.off > SAME && fit.named && fit.power === 1 ? versionGuess(column) : [];
  return [read, sidedGuess(column, fit, confidence), ...version];
}

/**
 * Conventions of an uploaded noise column as its numbers show them, beside the built-in curves or by size and slope.
 * Shape:  a table of rising frequencies and positive values, as in the file.
 * Units:  Hz and the column's own unit.
 * Error:  each guess states its confidence, a judgement, and its reason.
 * Fails:  never; where the numbers cannot tell there is no guess.
 * Source: domain reference, 4.2 and conventions C01, C02, C36, C40.
 */
export function guessNoise(whole: NoiseColumn): readonly Guess[] {
  const column = thinned(whole);
  const fit = fitCurve(column);
  if (fit !== null) return byFit(column, fit);
  const seen = sizeAndSlope(column);
  const found = seen === null ? null : byDetector(seen, column.meaning);
  const because = seen === null ? '' : `log₁₀ of its values is ${minus(short(seen.size))} (median) and they rise as f^${minus(short(seen.slope, 2))} over the highest octave`;
  const read = found === null ? [] : [columnGuess(column, found.meaning, found.confidence, because)];
  // The shape beside a curve means something only where the column was read as what it is.
  return [...read, ...(read.every(({ agrees }) => agrees) ? versionGuess(column) : [])];
}
