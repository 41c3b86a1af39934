import { inForce, isSwept, numberInForce, takes, type FlipContext } from './flip-context';
import { loudnessDraft } from './noise';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const hasModes = ({ waveforms }: FlipContext): boolean => waveforms.some(({ content }) => content.kind === 'modes');

export const polarisationContent: FlipsOfConvention = (context) => {
  const now = inForce(context, 'response');
  if (!takes(context, 'response') || now === undefined) return [];
  const words = { plus: 'only h₊ is used', cross: 'only h× is used', complex: 'both polarisations are used at once' } as const;
  return makeFlips(context, (['plus', 'cross', 'complex'] as const).filter((word) => word !== now).map((word) => ({
    convention: 'C08', option: `response=${word}`, setting: 'response', clause: words[word], change: { kind: 'rerun', settings: { response: word } },
  })));
};

/** |₋₂Y₂₂| face-on, ½√(5/π). */
const FACE_ON = 0.5 * Math.sqrt(5 / Math.PI);

export const angularFactor: FlipsOfConvention = (context) =>
  hasModes(context) && inForce(context, 'inclinationRad') !== undefined
    ? makeFlips(context, [
        loudnessDraft(context, 1 / FACE_ON, { convention: 'C09', option: 'bare', clause: 'the mode itself is taken for the strain, without its angular factor' }),
        loudnessDraft(context, FACE_ON, { convention: 'C09', option: 'twice', clause: 'the angular factor is applied twice' }),
      ])
    : [];

const sights = [{ value: 0, words: 'face-on' }, { value: Math.PI / 3, words: '60° from face-on' }, { value: Math.PI / 2, words: 'edge-on' }];

export const lineOfSight: FlipsOfConvention = (context) => {
  const now = numberInForce(context, 'inclinationRad');
  if (!takes(context, 'inclinationRad') || isSwept(context, 'inclinationRad') || !hasModes(context) || now === null) return [];
  return makeFlips(context, sights.filter(({ value }) => Math.abs(value - now) > 1e-9).map(({ value, words }) => ({
    convention: 'C10', option: `inclinationRad=${Number(value.toFixed(6))}`, setting: 'inclinationRad', clause: `the binary is seen ${words}`, change: { kind: 'rerun', settings: { inclinationRad: value } },
    telling: { supports: [new RegExp(words.replace('-', '[- ]'), 'i')] },
  })));
};

const averages = { optimal: 'the best orientation is taken, without an average', sky: 'the average over the sky is taken', 'sky-orientation': 'the average over sky and orientation is taken', volume: 'the average of the volume is taken' } as const;

export const averaged: FlipsOfConvention = (context) => {
  const now = inForce(context, 'average');
  const rows = takes(context, 'average') && now !== undefined && context.noise?.curve.alreadyAveraged !== true
    ? (Object.keys(averages) as (keyof typeof averages)[]).filter((word) => word !== now).map((word): FlipDraft => ({
        convention: 'C15', option: `average=${word}`, setting: 'average', clause: averages[word], change: { kind: 'rerun', settings: { average: word } },
        telling: { supports: word === 'optimal' ? [/optimal(?:ly)?\s+orient/i] : [/averag/i] },
      }))
    : [];
  return makeFlips(context, [
    ...rows,
    now !== 'optimal' ? null : loudnessDraft(context, 1 / Math.sqrt(5), { convention: 'C15', option: 'plus-alone', clause: 'the average over the sky keeps one polarisation alone', setting: 'average' }),
    numberInForce(context, 'armAngleDeg') !== 90 ? null : loudnessDraft(context, Math.sqrt(3) / 2, { convention: 'C15', option: 'arms-60', clause: 'the arms of the detector stand at 60°', setting: 'armAngleDeg' }),
  ]);
};

export const detectorCount: FlipsOfConvention = (context) => {
  const now = numberInForce(context, 'detectors');
  if (now === null) return [];
  return makeFlips(context, [1, 2, 3].filter((n) => n !== now).map((n) =>
    loudnessDraft(context, Math.sqrt(n / now), { convention: 'C16', option: `detectors=${n}`, setting: 'detectors', clause: `${n === 1 ? 'one detector is' : `${n} detectors are`} counted instead of ${now}`, declares: { detectors: n }, telling: { supports: n === 1 ? [/single[\s-]detector/i] : [/network/i] } }),
  ));
};

export const angleFlips: readonly FlipsOfConvention[] = [polarisationContent, angularFactor, lineOfSight, averaged, detectorCount];
