import type { Finding } from '../contract/finding';
import type { BinaryFacts, Mode } from '../contract/waveform';
import { loudModes, peakOf } from './loud-modes';
import { modeName, percent, short } from './spelt';

/** V15: a residual of the mirror rule above this is said. */
export const RESIDUAL = 0.01;
/** Pairs quieter than this share of the loudest mode hold rounding. */
const LOUD = 0.01;
/** Another relation fits when it leaves so much less. */
const FITS = 0.1;

/** A pair (ℓ, ±m) beside the mirror rule. */
export interface MirrorPair {
  readonly plus: Mode;
  readonly minus: Mode;
  /** Relative distance from (−1)^ℓ H*. */
  readonly residual: number;
  /** Fits H* with the other sign. */
  readonly signOnly: boolean;
  /** Fits H itself, with either sign. */
  readonly plain: boolean;
}

const pick = (modes: readonly Mode[], l: number, m: number): Mode | undefined => modes.find((mode) => mode.l === l && mode.m === m);

/** Relative distance of H(ℓ,−m) from a·H* or a·H of its partner. */
function distance(plus: Mode, minus: Mode, sign: number, conjugate: boolean): number {
  let [apart, whole] = [0, 0];
  for (let i = 0; i < plus.re.length; i++) {
    const [a, b] = [sign * plus.re[i]!, (conjugate ? -sign : sign) * plus.im[i]!];
    apart += (minus.re[i]! - a) ** 2 + (minus.im[i]! - b) ** 2;
    whole += (a * a + b * b + minus.re[i]! ** 2 + minus.im[i]! ** 2) / 2;
  }
  return whole > 0 ? Math.sqrt(apart / whole) : 0;
}

function pairOf(plus: Mode, minus: Mode): MirrorPair {
  const sign = plus.l % 2 === 0 ? 1 : -1;
  const residual = distance(plus, minus, sign, true);
  const fits = (s: number, conjugate: boolean): boolean => residual > RESIDUAL && distance(plus, minus, s, conjugate) < FITS * residual;
  return { plus, minus, residual, signOnly: fits(-sign, true), plain: fits(sign, false) || fits(-sign, false) };
}

/** Every pair of which one is loud enough to tell. */
export function mirrorPairs(modes: readonly Mode[]): readonly MirrorPair[] {
  const loud = loudModes(modes, LOUD).map(({ mode }) => mode);
  return modes
    .filter(({ m }) => m > 0)
    .flatMap((plus) => {
      const minus = pick(modes, plus.l, -plus.m);
      return minus && (loud.includes(plus) || loud.includes(minus)) ? [pairOf(plus, minus)] : [];
    });
}

function guessOf({ plus, minus, signOnly, plain }: MirrorPair): string {
  if (signOnly) return ` It agrees once its sign is changed: a factor ${plus.l % 2 === 0 ? '−1 too many' : '(−1)^ℓ missing'}?`;
  if (plain) return ` It agrees with ${modeName(plus)} itself instead of its conjugate: was ${modeName(minus)} copied without H*?`;
  return ' A precessing or unequally resolved system may do that; a convention that differs between the modes does too.';
}

/** V15: given modes with m < 0 against the mirror of their partners. */
export function mirrorFindings(modes: readonly Mode[], name: string): Finding[] {
  const broken = mirrorPairs(modes).filter(({ residual }) => residual > RESIDUAL);
  const worst = broken.reduce<MirrorPair | null>((p, q) => (p === null || q.residual > p.residual ? q : p), null);
  if (worst === null) return [];
  const others = broken.filter((pair) => pair !== worst).map(({ minus }) => modeName(minus));
  const more = others.length === 0 ? '' : ` Others that differ: ${others.join(', ')}.`;
  return [
    {
      code: 'engine/mirror-broken',
      level: 'worth-a-look',
      where: name,
      text: `${modeName(worst.minus)} of ${name} differs from the mirror of ${modeName(worst.plus)}, (−1)^ℓ H*, by ${percent(worst.residual)}.${guessOf(worst)}${more}`,
      fix: 'Check the sign convention of modes with m < 0, or leave them out and declare negativeM: mirror if the system is symmetric about its orbital plane.',
    },
  ];
}

/** V16: what an equal-mass, equal-spin binary may hold in modes of odd m. */
const ODD_SHARE = 1e-3;
/** Start-up radiation need not be symmetric: this part of a record without a declared end of it is passed over. */
const START = 0.1;

const near = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-6;

export interface OddContext {
  readonly axis: Float64Array;
  readonly unit: string;
  readonly binary: BinaryFacts;
  /** On the axis; null when not declared. */
  readonly junkEnd: number | null;
}

export function oddModeFindings(modes: readonly Mode[], { axis, unit, binary, junkEnd }: OddContext, name: string): Finding[] {
  const { massRatio, chi1z = 0, chi2z = 0 } = binary;
  const quadrupole = pick(modes, 2, 2);
  if (massRatio === undefined || !near(massRatio, 1) || !near(chi1z, chi2z) || quadrupole === undefined) return [];
  const first = axis[0]!;
  const from = junkEnd ?? first + START * (axis[axis.length - 1]! - first);
  const top = peakOf(quadrupole);
  const seen = modes
    .filter(({ m }) => m > 0 && m % 2 === 1)
    .map((mode) => {
      let [size, at] = [0, from];
      for (let i = 0; i < axis.length; i++) {
        const here = axis[i]! < from ? 0 : mode.re[i]! ** 2 + mode.im[i]! ** 2;
        if (here > size) [size, at] = [here, axis[i]!];
      }
      return { mode, share: Math.sqrt(size) / top, at };
    })
    .filter(({ share }) => share > ODD_SHARE);
  const worst = seen.reduce<(typeof seen)[number] | null>((p, q) => (p === null || q.share > p.share ? q : p), null);
  if (worst === null) return [];
  return [
    {
      code: 'engine/odd-m-at-equal-mass',
      level: 'worth-a-look',
      where: name,
      text: `${name} is declared with equal masses and equal spins, which leaves no power in modes of odd m; its ${modeName(worst.mode)} reaches ${percent(worst.share)} of (2,2), at t = ${short(worst.at, 6)} ${unit}.`,
      fix: 'Check massRatio and the spins; if they hold, the sphere of extraction may lie off centre.',
    },
  ];
}
