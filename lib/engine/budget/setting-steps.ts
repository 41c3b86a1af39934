/** Where a setting is put to see how much hangs on it: a small step for a number, the other words for a choice. */
type Steps = (used: unknown) => readonly unknown[];

const numeric = (steps: (x: number) => readonly number[]): Steps => (used) => (typeof used === 'number' && Number.isFinite(used) ? steps(used).filter((x) => x !== used) : []);
const byPart = (part: number): Steps => numeric((x) => [x * (1 - part), x * (1 + part)]);
const by = (step: number, low = -Infinity, high = Infinity): Steps => numeric((x) => [x - step, x + step].filter((y) => y >= low && y <= high));
const others = (...words: readonly unknown[]): Steps => (used) => words.filter((word) => word !== used);

const TEN_DEGREES = Math.PI / 18;
const MOVED = 0.2;

const ofTaper: Steps = (used) => (used === 'none' ? ['auto'] : typeof used === 'number' ? [used / 2, 2 * used, 'none'] : [0.5, 2, 'none']);

const ofModes: Steps = (used) => (used === 'all' ? [[[2, 2], [2, -2]]] : ['all']);

const ofWindow: Steps = (used) => {
  if (!Array.isArray(used)) return [];
  const [from, to] = used as [number, number];
  return [[from + MOVED * (to - from), to], [from, to - MOVED * (to - from)]];
};

const ofCosmology: Steps = (used) => {
  const { h0, omegaM } = used as { h0: number; omegaM: number };
  return [{ h0: h0 - 0.5, omegaM }, { h0: h0 + 0.5, omegaM }, { h0, omegaM: omegaM + 0.01 }];
};

const ofMaximise: Steps = (used) => (Array.isArray(used) && used.includes('phase') ? [['time'], []] : [['time', 'phase']]);

/** A swept place is its bare time. */
const ofPlace: Steps = (used) => {
  if (typeof used === 'number') return [used - 10, used + 10];
  if (used === 'peak') return ['maximum'];
  if (typeof used !== 'object' || used === null) return ['peak'];
  return 'timeM' in used ? [{ timeM: (used.timeM as number) - 10 }, { timeM: (used.timeM as number) + 10 }] : ['peak'];
};

const steps: Readonly<Record<string, Steps>> = {
  totalMassMsun: byPart(0.01),
  distanceMpc: byPart(0.01),
  redshift: byPart(0.01),
  fLowHz: byPart(0.1),
  fHighHz: byPart(0.1),
  inclinationRad: by(TEN_DEGREES, 0, Math.PI),
  azimuthRad: by(TEN_DEGREES),
  taper: ofTaper,
  response: (used) => (used === 'plus' ? ['cross', 'complex'] : ['plus', ...(used === 'complex' ? [] : ['complex'])]),
  modes: ofModes,
  lMax: numeric((x) => (x > 2 ? [x - 1] : [])),
  maximise: ofMaximise,
  average: (used) => (used === 'optimal' ? ['sky-orientation'] : ['optimal']),
  detectors: numeric((n) => [n + 1]),
  armAngleDeg: numeric((x) => [x === 90 ? 60 : 90]),
  threshold: byPart(0.01),
  cosmology: ofCosmology,
  startM: by(50),
  window: ofWindow,
  integrationFloor: numeric((x) => [0.7 * x, 1.4 * x]),
  includeEnergyBeforeStart: others(false, true, 'removed'),
  normaliseBy: others('M', 'adm', 'remnant'),
  alignment: (used) => (used === 'window' ? ['peak', 'none'] : ['window']),
  at: ofPlace,
  parameters: numeric((n) => [n + 1]),
  rateLaw: others('euclidean', 'comoving'),
  joinHz: byPart(0.2),
  amplitudeOrder: others(0, 1),
  formalOrder: by(1, 1),
  extrapolationOrder: by(1, 1, 4),
  weight: others('plane', 'diagonal', 'plane-volume', 'diagonal-volume'),
  statistic: others('minimum', 'mean', 'weighted'),
  method: others('balance-adm', 'balance-pn', 'ringdown'),
  massRatio: byPart(0.01),
  chi1z: by(0.01, -1, 1),
  chi2z: by(0.01, -1, 1),
  fieldGauss: byPart(0.01),
  plasmaDensityCm3: byPart(0.1),
  radiativeEfficiency: byPart(0.1),
  accretionRateMsunPerYear: byPart(0.1),
  internalEnergyErg: byPart(0.1),
  radiusM: byPart(0.1),
  negativeM: (used) => (used === 'mirror' ? ['none'] : []),
};

/**
 * Other values of a setting that are tried, each alone.
 * Shape:  none where nothing small or other can be said of it.
 * Units:  the setting's own.
 * Error:  none.
 * Fails:  never.
 * Source: ours; steps of the budget where it has them (domain reference 5.1).
 */
export const stepsOf = (setting: string, used: unknown): readonly unknown[] => (used === null || used === undefined ? [] : (steps[setting]?.(used) ?? []));
