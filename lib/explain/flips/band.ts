import { measured } from './evidence';
import { atPoints, inForce, isSwept, numberInForce, redshiftOf, takes, type FlipContext } from './flip-context';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const groundLow = [8, 10, 12, 15, 20, 25, 30, 40, 50];
const spaceLow = [1e-5, 2e-5, 5e-5, 1e-4, 2e-4, 5e-4, 1e-3];
const groundHigh = [128, 256, 512, 1024, 2048, 4096, 8192];
const spaceHigh = [0.01, 0.03, 0.1, 0.3, 1];

const isSpace = ({ noise }: FlipContext): boolean => noise !== null && noise.curve.fHighHz <= 10;

export const lowerEdge: FlipsOfConvention = (context) => {
  const { noise } = context;
  if (noise === null || !takes(context, 'fLowHz') || isSwept(context, 'fLowHz')) return [];
  const now = numberInForce(context, 'fLowHz');
  const from = now === null ? 'the one in force' : `${now} Hz`;
  const reachable = (isSpace(context) ? spaceLow : groundLow).filter((f) => f !== now && f >= noise.curve.fLowHz && f < noise.curve.fHighHz);
  return makeFlips(context, reachable.map((f) => ({
    convention: 'C04', option: `fLowHz=${f}`, setting: 'fLowHz', clause: `the lower cut-off is ${f} Hz instead of ${from}`, change: { kind: 'rerun', settings: { fLowHz: f } },
    telling: { supports: [measured(f, 'Hz')], contradicts: now === null ? [] : [measured(now, 'Hz')] },
  })));
};

/** Frequency of the last stable circular orbit without spin, at the mass that the detector sees. */
const lastOrbitHz = (massMsun: number): number => 4397.2 / massMsun;

function lastOrbit(context: FlipContext): FlipDraft | null {
  const z = inForce(context, 'massFrame') === 'source' ? redshiftOf(context) : 0;
  const masses = atPoints(context, 'totalMassMsun');
  const low = numberInForce(context, 'fLowHz') ?? context.noise?.curve.fLowHz ?? 0;
  if (z === null) return null;
  const edges = masses.flatMap((mass) => (mass === null ? [] : [Number(lastOrbitHz(mass * (1 + z)).toPrecision(12))]));
  if (edges.length === 0 || edges.length < masses.length || edges.some((edge) => edge <= low)) return null;
  return { convention: 'C05', option: 'last-orbit', setting: 'fHighHz', clause: 'the upper cut-off is the frequency of the last stable orbit', change: { kind: 'rerun', settings: {}, perPoint: edges.map((edge) => ({ fHighHz: edge })) }, telling: { supports: [/\bISCO\b/i, /last stable/i] } };
}

export const upperEdge: FlipsOfConvention = (context) => {
  const { noise } = context;
  if (noise === null || !takes(context, 'fHighHz') || isSwept(context, 'fHighHz')) return [];
  const now = numberInForce(context, 'fHighHz');
  const from = now === null ? 'the one in force' : `${Number(now.toPrecision(6))} Hz`;
  const low = numberInForce(context, 'fLowHz') ?? noise.curve.fLowHz;
  const reachable = (isSpace(context) ? spaceHigh : groundHigh).filter((f) => f !== now && f <= noise.curve.fHighHz && f > low);
  const fixed = reachable.map((f): FlipDraft => ({
    convention: 'C05', option: `fHighHz=${f}`, setting: 'fHighHz', clause: `the upper cut-off is ${f} Hz instead of ${from}`, change: { kind: 'rerun', settings: { fHighHz: f } },
    telling: { supports: [measured(f, 'Hz')], contradicts: now === null ? [] : [measured(now, 'Hz')] },
  }));
  return makeFlips(context, [...fixed, lastOrbit(context)]);
};

const tapers: readonly { readonly value: 'auto' | 'none' | number; readonly words: string }[] = [
  { value: 'auto', words: 'the house taper is applied' },
  { value: 'none', words: 'no taper is applied' },
  { value: 0.5, words: 'the taper is half as long' },
  { value: 2, words: 'the taper is twice as long' },
];

export const tapering: FlipsOfConvention = (context) => {
  const now = inForce(context, 'taper');
  if (!takes(context, 'taper') || isSwept(context, 'taper') || now === undefined) return [];
  return makeFlips(context, tapers.filter(({ value }) => value !== now && !(value === 'auto' && now === 1)).map(({ value, words }) => ({
    convention: 'C37', option: `taper=${value}`, setting: 'taper', clause: words, change: { kind: 'rerun', settings: { taper: value } },
    telling: value === 'none' ? { supports: [/no\s+taper|untapered|without\s+(?:a\s+)?taper/i] } : {},
  })));
};

export const bandFlips: readonly FlipsOfConvention[] = [lowerEdge, upperEdge, tapering];
