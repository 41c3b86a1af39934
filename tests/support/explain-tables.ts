import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Variable, Waveform } from '@/lib/engine/contract/waveform';
import { Workshop } from '@/lib/engine/contract/workshop';
import { quantities } from '@/lib/engine/quantities/registry';
import type { Flip } from '@/lib/explain/flip';
import type { JudgedClaim } from '@/lib/explain/search/node';
import { binary, curve } from './detector-claims';
import { factorFlip, flipOf } from './explain-flips';

/** What a claim of one kind gives under the declared settings and under every single flip, at each point. */
export interface PredictionTable {
  readonly quantity: string;
  readonly law: JudgedClaim['law'];
  readonly scale: JudgedClaim['scale'];
  readonly tolerance: (claimed: number) => number;
  readonly at: readonly Readonly<Record<string, number>>[];
  readonly declared: readonly number[];
  readonly flips: readonly { readonly flip: Flip; readonly values: readonly (number | null)[] }[];
}

interface Base {
  readonly quantity: string;
  readonly of: Readonly<Record<string, Waveform>>;
  readonly noise: NoiseCurve | null;
  readonly settings: DeclaredSettings;
  readonly over: { readonly setting: SettingName; readonly values: readonly number[] };
}

interface Change {
  readonly settings?: DeclaredSettings;
  readonly noise?: NoiseCurve;
  readonly variable?: Variable;
  readonly modes?: (m: number, l: number) => boolean;
  /** Multiplies the swept values. */
  readonly scale?: number;
}

const quiet = { onProgress: () => undefined, cancelled: () => false };
const edited = (waveform: Waveform, { variable, modes }: Change): Waveform => ({
  ...waveform,
  ...(variable ? { variable } : {}),
  ...(modes && waveform.content.kind === 'modes' ? { negativeM: 'none' as const, content: { kind: 'modes' as const, modes: waveform.content.modes.filter(({ l, m }) => modes(m, l)) } } : {}),
});

function valuesOf(base: Base, change: Change, workshop: Workshop): (number | null)[] {
  const touched = change.variable !== undefined || change.modes !== undefined;
  const of = touched ? Object.fromEntries(Object.entries(base.of).map(([role, waveform]) => [role, edited(waveform, change)])) : base.of;
  const { points } = quantities.get(base.quantity)!.measure(
    { claimId: 'C1', inputs: { of, noise: change.noise ?? base.noise }, settings: { ...base.settings, ...change.settings }, over: { setting: base.over.setting, values: base.over.values.map((x) => x * (change.scale ?? 1)) }, claimed: [], withFigures: false, routeAOnly: true, workshop },
    quiet,
  );
  return points.map(({ value }) => value);
}

const G2 = curve('G2');
const bent = (psd: (f: number) => number): NoiseCurve => ({ ...G2, builtIn: null, psd });
const set = (id: string, settings: DeclaredSettings): [string, Change] => [id, { settings }];

/** Reruns that touch everything heard through a detector. */
const heard: readonly (readonly [string, Change])[] = [
  ...[10, 15, 25, 30, 40].map((fLowHz) => set(`C04:fLowHz=${fLowHz}`, { fLowHz })),
  ...[128, 256, 512, 1024].map((fHighHz) => set(`C05:fHighHz=${fHighHz}`, { fHighHz })),
  ...(['none', 0.5, 2] as const).map((taper) => set(`C37:taper=${taper}`, { taper })),
  ['C01:root', { noise: bent((f) => Math.sqrt(G2.psd(f))) }], ['C01:square', { noise: bent((f) => G2.psd(f) ** 2) }], ['C36:angular', { noise: bent((f) => G2.psd(2 * Math.PI * f)) }],
  ...['G1', 'A1', 'A2'].map((id): [string, Change] => [`C40:${id}`, { noise: curve(id) }]),
  ...(['news', 'psi4'] as const).map((variable): [string, Change] => [`C19:${variable}`, { variable }]),
  ...([['adm', 1 / 0.99], ['remnant', 1 / 0.952], ['chirp', 0.25 ** -0.6], ['component', 2], ['half', 0.5]] as const).map(([name, scale]): [string, Change] => [`C12:${name}`, { scale }]),
  ['C11:source', { scale: 1.1972 }],
];
const maxima: readonly (readonly [string, Change])[] = ([[], ['phase'], ['time']] as const).map((maximise) => set(`C06:maximise=${maximise.join() || 'none'}`, { maximise: [...maximise] }));
const radiated: readonly (readonly [string, Change])[] = [
  set('C25:lMax=2', { lMax: 2 }), set('C25:modes=22', { modes: [[2, 2], [2, -2]] }), ['C24:absent', { modes: (m) => m > 0 }], set('C31:later', { startM: 400 }), set('C31:much-later', { startM: 900 }),
];

const loud: readonly (readonly [string, number])[] = [
  ['C02:quieter', Math.SQRT1_2], ['C02:louder', Math.SQRT2], ['C03:2', Math.SQRT1_2], ['C03:1', 0.5], ['C35:divided', 1 / Math.sqrt(2 * Math.PI)], ['C35:multiplied', Math.sqrt(2 * Math.PI)],
  ['C09:bare', 1.5853], ['C09:twice', 0.6308], ['C15:sky', Math.sqrt(0.4)], ['C15:sky-orientation', 0.4], ['C15:plus-alone', 1 / Math.sqrt(5)], ['C15:volume', 1 / 2.2648], ['C15:arms-60', Math.sqrt(3) / 2],
  ['C16:2', Math.SQRT2], ['C16:3', Math.sqrt(3)],
];
const far: readonly (readonly [string, number])[] = [5, 7, 10, 12].map((x) => [`C17:threshold=${x}`, 8 / x]);
const near: readonly (readonly [string, number])[] = [['C13:comoving', 1 / 1.1972], ['C13:angular', 1 / 1.1972 ** 2], ['C13:used', 1.1972]];
const flux: readonly (readonly [string, number])[] = [['C20:doubled', 4], ['C20:halved', 0.25], ['C33:adm', 1 / 0.99], ['C33:remnant', 1 / 0.952], ['C32:before', 1.21], ['C27:isotropic', 1.0202], ['C55:per-cent', 100]];
const kicks: readonly (readonly [string, number])[] = [['C20:doubled', 4], ['C20:halved', 0.25], ['C46:M', 0.952], ['C27:isotropic', 1.0202]];

function tableOf(base: Base, law: JudgedClaim['law'], changes: readonly (readonly [string, Change])[], factors: readonly (readonly [string, number])[]): PredictionTable {
  const workshop = new Workshop();
  const { scale, naturalTolerance } = quantities.get(base.quantity)!;
  const declared = valuesOf(base, {}, workshop).map((value) => value!);
  return {
    quantity: base.quantity, law, scale, declared,
    tolerance: (claimed) => (scale === 'ln' ? Math.log1p(naturalTolerance(claimed, base.settings)) : naturalTolerance(claimed, base.settings)),
    at: base.over.values.map((value) => ({ [base.over.setting]: value })),
    flips: [
      ...changes.filter(([, { settings }]) => settings === undefined || !(base.over.setting in settings)).map(([id, change]) => ({ flip: flipOf(id), values: valuesOf(base, change, workshop) })),
      ...factors.map(([id, factor]) => ({ flip: factorFlip(id, factor), values: declared.map((value) => value * factor) })),
    ],
  };
}

/** Five kinds of claims over their free parameter, by the engine itself. */
export function predictionTables(): PredictionTable[] {
  const modes = ['22'] as const;
  const a = binary('a', { mOmega0: 0.02, modes });
  const b = binary('b', { mOmega0: 0.02, modes, chi1z: 0.2, chi2z: 0.2 });
  const pair = binary('q', { massRatio: 2, mOmega0: 0.02, modes: ['22', '21', '33'] });
  const masses = { setting: 'totalMassMsun' as const, values: [70, 85, 100, 130, 170, 220] };
  const starts = { setting: 'startM' as const, values: [0, 150, 300, 500, 700, 1000] };
  return [
    tableOf({ quantity: 'match', of: { a, b }, noise: G2, settings: { fLowHz: 20 }, over: masses }, 'distance-from-one', [...heard, ...maxima], []),
    tableOf({ quantity: 'snr', of: { a }, noise: G2, settings: { fLowHz: 20, distanceMpc: 1000 }, over: masses }, 'size', heard, [...loud, ...near]),
    tableOf({ quantity: 'horizon-distance', of: { a }, noise: G2, settings: { fLowHz: 20, massFrame: 'detector' }, over: masses }, 'size', heard, [...loud, ...far]),
    tableOf({ quantity: 'radiated-energy', of: { a: pair }, noise: null, settings: {}, over: starts }, 'size', radiated, flux),
    tableOf({ quantity: 'recoil', of: { a: pair }, noise: null, settings: {}, over: starts }, 'size', radiated, kicks),
  ];
}
