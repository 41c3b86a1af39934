import { measured } from './evidence';
import type { FlipContext } from './flip-context';
import { loudnessChange, makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const amplitudeWords = [/\bASD\b/i, /amplitude\s+spectr/i, /(?:\/|per\s+)\s*(?:sqrt|√)\s*\(?\s*Hz/i, /Hz\s*\^?\s*\(?\s*-\s*(?:1\/2|0\.5)/i, /\bh_?n\b/];
const powerWords = [/\bPSD\b/i, /power\s+spectr/i, /(?:\/|per\s+)\s*Hz\b/i, /Hz\s*\^?\s*\(?\s*-\s*1(?!\/)/i];

/** A heading that names amplitudes, over a column declared so, is what can be missed; one that names power can be squared once more. */
export const columnMeaning: FlipsOfConvention = (context) => {
  if (context.noise === null) return [];
  const table = context.noise.column !== null;
  // What the numbers show turns the sentence round: the file is right, its declaration is not.
  const clauseOf = (option: string, usual: string, shown: string): string => (context.shown.some((one) => one.convention === 'C01' && one.option === option) ? shown : usual);
  const ofColumn = (column: 'asd' | 'psd', words: readonly RegExp[]) => ({ supports: context.noise?.column === column ? words : [] });
  const drafts: (FlipDraft | null)[] = [
    { convention: 'C01', option: 'root', clause: clauseOf('root', 'the noise column, an amplitude density, is used as if it were the power density', 'the noise column holds the power density instead of its root'), change: rerun({ edit: 'noise-power', power: 0.5 }), telling: ofColumn('asd', amplitudeWords) },
    { convention: 'C01', option: 'square', clause: clauseOf('square', 'the noise, a power density already, is squared once more', 'the noise column holds the amplitude density instead of its square'), change: rerun({ edit: 'noise-power', power: 2 }), telling: ofColumn('psd', powerWords) },
    table ? { convention: 'C01', option: 'characteristic', clause: 'the noise column is a characteristic strain, to be divided by √f', change: rerun({ edit: 'noise-times-frequency', power: -1 }), telling: { supports: [/characteristic/i, /\bh_?c\b/] } } : null,
    table ? { convention: 'C01', option: 'not-characteristic', clause: 'the noise column is multiplied by √f', change: rerun({ edit: 'noise-times-frequency', power: 1 }) } : null,
  ];
  return makeFlips(context, drafts);
};

const rerun = (edit: NonNullable<Extract<FlipDraft['change'], { kind: 'rerun' }>['inputs']>[number]): FlipDraft['change'] => ({ kind: 'rerun', settings: {}, inputs: [edit] });

/** A factor of loudness as a draft, or null where it cancels. */
export function loudnessDraft(context: FlipContext, k: number, rest: Omit<FlipDraft, 'change'>): FlipDraft | null {
  const change = loudnessChange(context, k);
  return change === null ? null : { ...rest, change };
}

export const sidedness: FlipsOfConvention = (context) => {
  if (context.noise === null) return [];
  const telling = { supports: [/two[\s-]?sided/i], contradicts: [/one[\s-]?sided/i] };
  return makeFlips(context, [
    loudnessDraft(context, Math.SQRT1_2, { convention: 'C02', option: 'quieter', clause: 'the spectrum is doubled as if it were two-sided', telling }),
    loudnessDraft(context, Math.SQRT2, { convention: 'C02', option: 'louder', clause: 'the spectrum is halved as if half of it stood at negative frequencies', telling }),
  ]);
};

export const innerProduct: FlipsOfConvention = (context) =>
  context.noise === null
    ? []
    : makeFlips(context, [
        loudnessDraft(context, Math.SQRT1_2, { convention: 'C03', option: '2', clause: 'the inner product carries the factor 2 instead of 4' }),
        loudnessDraft(context, 0.5, { convention: 'C03', option: '1', clause: 'the inner product carries the factor 1 instead of 4' }),
        loudnessDraft(context, Math.SQRT2, { convention: 'C03', option: '8', clause: 'the factor 4 of the inner product is doubled once more' }),
      ]);

export const transformFactor: FlipsOfConvention = (context) =>
  context.noise === null
    ? []
    : makeFlips(context, [
        loudnessDraft(context, 1 / Math.sqrt(2 * Math.PI), { convention: 'C35', option: 'divided', clause: 'the Fourier transform carries a factor 1/√(2π)' }),
        loudnessDraft(context, Math.sqrt(2 * Math.PI), { convention: 'C35', option: 'multiplied', clause: 'the Fourier transform carries a factor √(2π)' }),
      ]);

export const angularFrequency: FlipsOfConvention = (context) =>
  context.noise === null || context.noise.column === null
    ? []
    : makeFlips(context, [{ convention: 'C36', option: 'angular', clause: 'the frequencies of the noise curve are angular, ω = 2πf', change: rerun({ edit: 'noise-angular' }), telling: { supports: [/rad\s*\/?\s*s/i, /\bomega\b/i, /ω/], contradicts: [measured(1, 'Hz')] } }]);

/** Another curve of the library in the place of the one in force, where its range holds the band. */
export const curveVersion: FlipsOfConvention = (context) => {
  const { noise, curves } = context;
  if (noise === null) return [];
  const others = curves.filter(({ id, fLowHz, fHighHz }) => id !== noise.curve.builtIn && fLowHz <= 2 * noise.curve.fLowHz && fHighHz >= noise.curve.fLowHz * 4);
  return makeFlips(
    context,
    others.map(({ id }) => ({
      convention: 'C40',
      option: id,
      clause: noise.curve.builtIn === null ? `the published curve ${id} is used instead of the attached one` : `the curve ${id} is used instead of ${noise.curve.builtIn}`,
      change: rerun({ edit: 'noise-curve', curve: id }),
      exchange: true,
      telling: { supports: [new RegExp(String.raw`\b${id}\b`)] },
    })),
  );
};

export const noiseFlips: readonly FlipsOfConvention[] = [columnMeaning, sidedness, innerProduct, transformFactor, angularFrequency, curveVersion];
