import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';

/** 1/S on bins, and how it continues past the kinks of a table. */
export interface NoiseWeigher {
  /** A closed form is not asked outside its curve; the power laws of a table continue anywhere. */
  readonly closedForm: boolean;
  /** No 1/S on the curve is larger: what bounds a tail without a look at every bin. */
  readonly ceiling: number;
  /** Frequencies at which the formula of 1/S changes, rising; empty for a closed form. */
  readonly kinksHz: Float64Array;
  /** Largest |d ln S/d ln f| in a range, for choosing the bins. */
  readonly steepness: (fLowHz: number, fHighHz: number) => number;
  /** Spacing of bins at which the steeper law beside any kink in a range changes ln S by at most `change` (Infinity for a closed form). */
  readonly kinkResolutionHz: (fLowHz: number, fHighHz: number, change: number) => number;
  /** out[i] = 1/S at bin first + i, given ln f of every bin; bins inside the curve only. */
  readonly fill: (out: Float64Array, logF: Float64Array, first: number, last: number, offset: number) => void;
  /** |d ln S/d ln f| beside a kink, the larger. */
  readonly steepnessAt: (index: number) => number;
  /** What 1/S gains where the law above a kink stands in for the one below it: powers 1 … JUMP_TERMS of f/f_kink − 1, kink after kink. */
  readonly jumps: Float64Array;
  /** The same gain at ln(f/f_kink), whatever the steepness. */
  readonly jumpAt: (index: number, y: number) => number;
  /** 1/S at ln f by the formula that holds just above (side +1) or below (side −1) kink `index`, continued. */
  readonly continuedAt: (index: number, side: 1 | -1, logF: number) => number;
  /** Index of the first kink above f; the formula at f is the one below that kink. */
  readonly firstKinkAbove: (fHz: number) => number;
}

const TABLE_STEP = 4e-3;
const TABLE_ERROR = 2e-14;
const SMALLEST_STEP = 1e-4;
const NODES = 6;

/** Coefficients of the polynomial through six nodes −2 … 3, in powers of x on [0, 1]. */
const sixPoint: readonly (readonly number[])[] = (() => {
  const nodes = [-2, -1, 0, 1, 2, 3];
  return nodes.map((node, j) => {
    let poly = [1];
    for (const other of nodes) {
      if (other === node) continue;
      const next = new Array<number>(poly.length + 1).fill(0);
      poly.forEach((c, d) => {
        next[d + 1]! += c / (node - other);
        next[d]! -= (c * other) / (node - other);
      });
      poly = next;
    }
    if (j >= NODES) throw new Error('six nodes');
    return poly;
  });
})();

/** The same with the nodes of one power side by side. */
const sixPointByPower = Float64Array.from({ length: NODES * NODES }, (_, i) => sixPoint[i % NODES]![Math.floor(i / NODES)]!);

interface Table {
  readonly coefficients: Float64Array;
  readonly start: number;
  readonly perUnit: number;
  readonly cells: number;
}

/** Node values of 1/S; where the stencil leaves the curve it is shifted inside, so nothing is asked beyond its ends. */
function buildTable(curve: NoiseCurve, step: number): Table {
  const [low, high] = [Math.log(curve.fLowHz), Math.log(curve.fHighHz)];
  const cells = Math.max(NODES, Math.ceil((high - low) / step));
  const h = (high - low) / cells;
  const at = (i: number): number => (i === 0 ? curve.fLowHz : i === cells ? curve.fHighHz : Math.exp(low + i * h));
  const value = Float64Array.from({ length: cells + 1 }, (_, i) => 1 / curve.psd(at(i)));
  const coefficients = new Float64Array(NODES * cells);
  for (let i = 0; i < cells; i++) {
    const from = Math.max(0, Math.min(i - 2, cells + 1 - NODES));
    shiftedCell(coefficients, i, value, from, i - 2 - from);
  }
  return { coefficients, start: low, perUnit: 1 / h, cells };
}

/** The sextic stencil starting at node `from`; near the ends its polynomial is re-expanded about the cell's own left node. */
function shiftedCell(out: Float64Array, cell: number, value: Float64Array, from: number, shift: number): void {
  const about = shift === 0 ? out.subarray(NODES * cell, NODES * (cell + 1)) : new Float64Array(NODES);
  for (let d = 0; d < NODES; d++) {
    let sum = 0;
    for (let j = 0; j < NODES; j++) sum += value[from + j]! * sixPointByPower[NODES * d + j]!;
    about[d] = sum;
  }
  if (shift === 0) return;
  // x measured from the cell = y − shift, y measured from the stencil's third node.
  for (let d = 0; d < NODES; d++) {
    let sum = 0;
    let binomial = 1;
    for (let k = d; k < NODES; k++) {
      sum += about[k]! * binomial * shift ** (k - d);
      binomial = (binomial * (k + 1)) / (k + 1 - d);
    }
    out[NODES * cell + d] = sum;
  }
}

const readTable = ({ coefficients: c, start, perUnit, cells }: Table, logF: number): number => {
  const v = Math.max(0, (logF - start) * perUnit);
  const i = Math.min(cells - 1, Math.floor(v));
  const x = v - i;
  const o = NODES * i;
  return c[o]! + x * (c[o + 1]! + x * (c[o + 2]! + x * (c[o + 3]! + x * (c[o + 4]! + x * c[o + 5]!))));
};

/** Halve the step until the table's own middle points agree with the formula. */
function tableOf(curve: NoiseCurve, halvings: number): Table {
  let step = likelyStep(curve);
  let table = buildTable(curve, step);
  while (step > SMALLEST_STEP && worstMiddle(curve, table) > TABLE_ERROR) table = buildTable(curve, (step /= 2));
  return halvings === 0 ? table : buildTable(curve, step / 2 ** halvings);
}

const SAMPLED_CELLS = 24;

/** The step that some cells need, so that whole tables too coarse for them are not built. */
function likelyStep(curve: NoiseCurve): number {
  const [low, high] = [Math.log(curve.fLowHz), Math.log(curve.fHighHz)];
  const tooCoarse = (step: number): boolean =>
    Array.from({ length: SAMPLED_CELLS }, (_, i) => low + 4 * step + ((high - low - 8 * step) * i) / (SAMPLED_CELLS - 1)).some((at) => {
      const value = (place: number): number => 1 / curve.psd(Math.exp(at + place * step));
      const read = (150 * (value(0) + value(1)) - 25 * (value(-1) + value(2)) + 3 * (value(-2) + value(3))) / 256;
      return Math.abs(read / value(0.5) - 1) > TABLE_ERROR;
    });
  let step = TABLE_STEP;
  while (step > SMALLEST_STEP && high - low > 16 * step && tooCoarse(step)) step /= 2;
  return step;
}

function worstMiddle(curve: NoiseCurve, table: Table): number {
  let worst = 0;
  for (let i = 0; i < table.cells; i += 3) {
    const logF = table.start + (i + 0.5) / table.perUnit;
    const exact = 1 / curve.psd(Math.exp(logF));
    worst = Math.max(worst, Math.abs(readTable(table, logF) / exact - 1));
  }
  return worst;
}

/** Between nodes a smooth curve may rise a little above both. */
const CEILING_ROOM = 1.1;
const largestNode = ({ coefficients, cells }: Table): number => {
  let most = 0;
  for (let i = 0; i < cells; i++) most = Math.max(most, coefficients[NODES * i]!);
  return most;
};

function closedFormWeigher(curve: NoiseCurve, halvings: number): NoiseWeigher {
  const table = tableOf(curve, halvings);
  const steepness = (fLowHz: number, fHighHz: number): number => {
    const slopeAt = (f: number): number => {
      const g = Math.min(f * 1.001, curve.fHighHz);
      const e = g / 1.001;
      return Math.abs(Math.log(curve.psd(g) / curve.psd(Math.max(e, curve.fLowHz))) / 0.001);
    };
    return Math.max(slopeAt(fLowHz), slopeAt(fHighHz));
  };
  const fill: NoiseWeigher['fill'] = (out, logF, first, last, offset) => fillFromTable(table, out, logF, first, last, offset);
  return {
    closedForm: true,
    ceiling: CEILING_ROOM * largestNode(table),
    kinksHz: new Float64Array(0),
    steepness,
    kinkResolutionHz: () => Infinity,
    fill,
    steepnessAt: () => 0,
    jumps: new Float64Array(0),
    jumpAt: () => 0,
    continuedAt: (_index, _side, logF) => readTable(table, logF),
    firstKinkAbove: () => 0,
  };
}

function fillFromTable(table: Table, out: Float64Array, logF: Float64Array, first: number, last: number, offset: number): void {
  const { coefficients: c, start, perUnit, cells } = table;
  const shift = (offset - start) * perUnit;
  for (let k = first; k <= last; k++) {
    const v = logF[k]! * perUnit + shift;
    let i = v | 0;
    if (i >= cells) i = cells - 1;
    if (i < 0) i = 0;
    const x = v - i;
    const o = NODES * i;
    out[k - first] = c[o]! + x * (c[o + 1]! + x * (c[o + 2]! + x * (c[o + 3]! + x * (c[o + 4]! + x * c[o + 5]!))));
  }
}

/** e^z; the rows of a table stand so close that z is mostly small, and a short series is as exact and three times as fast. */
function expNearZero(z: number): number {
  if (z > 0.08 || z < -0.08) return Math.exp(z);
  return 1 + z * (1 + z * (1 / 2 + z * (1 / 6 + z * (1 / 24 + z * (1 / 120 + z * (1 / 720 + z * (1 / 5040 + z / 40320)))))));
}

export const JUMP_TERMS = 10;

/** 1/S above each kink less 1/S below it: the binomial series of both power laws. */
function jumpSeries(inverse: Float64Array, slope: Float64Array): Float64Array {
  const made = new Float64Array(JUMP_TERMS * (slope.length - 1));
  for (let i = 0; i < slope.length - 1; i++) {
    let [above, below] = [inverse[i + 1]!, inverse[i + 1]!];
    for (let n = 1; n <= JUMP_TERMS; n++) {
      above *= (-slope[i + 1]! - n + 1) / n;
      below *= (-slope[i]! - n + 1) / n;
      made[JUMP_TERMS * i + n - 1] = above - below;
    }
  }
  return made;
}

function tableWeigher(curve: NoiseCurve, points: Float64Array): NoiseWeigher {
  const segments = points.length - 1;
  const logP = points.map(Math.log);
  const values = points.map((f) => curve.psd(f));
  const logS = values.map(Math.log);
  const slope = Float64Array.from({ length: segments }, (_, i) => (logS[i + 1]! - logS[i]!) / (logP[i + 1]! - logP[i]!));
  const inverse = logS.map((x) => Math.exp(-x));
  const inSegment = (i: number, logF: number): number => inverse[i]! * expNearZero(-slope[i]! * (logF - logP[i]!));
  const steep = Float64Array.from({ length: segments - 1 }, (_, i) => Math.max(Math.abs(slope[i]!), Math.abs(slope[i + 1]!)));
  const jumps = jumpSeries(inverse, slope);
  const firstKinkAbove = (fHz: number): number => {
    let [low, high] = [0, segments - 1];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (points[middle + 1]! > fHz) high = middle;
      else low = middle + 1;
    }
    return low;
  };
  // Kink i stands between segments i and i + 1, at point i + 1.
  const kinksHz = points.slice(1, segments);
  const fill: NoiseWeigher['fill'] = (out, logF, first, last, offset) => {
    let i = firstKinkAbove(Math.exp(logF[first]! + offset));
    for (let k = first; k <= last; i++) {
      const end = i < segments - 1 ? logP[i + 1]! : Infinity;
      const from = logP[i]! - offset;
      const fall = -slope[i]!;
      const top = inverse[i]!;
      for (; k <= last && logF[k]! + offset < end; k++) out[k - first] = top * expNearZero(fall * (logF[k]! - from));
    }
  };
  return {
    closedForm: false,
    ceiling: values.reduce((most, s) => Math.max(most, 1 / s), 0),
    kinksHz,
    steepness: (fLowHz, fHighHz) => Math.max(Math.abs(slope[firstKinkAbove(fLowHz)]!), Math.abs(slope[firstKinkAbove(fHighHz)]!)),
    kinkResolutionHz: (fLowHz, fHighHz, change) => finestKink(kinksHz, slope, fLowHz, fHighHz, change),
    fill,
    steepnessAt: (index) => steep[index]!,
    jumps,
    jumpAt: (index, y) => inverse[index + 1]! * (expNearZero(-slope[index + 1]! * y) - expNearZero(-slope[index]! * y)),
    continuedAt: (index, side, logF) => inSegment(side > 0 ? index + 1 : index, logF),
    firstKinkAbove,
  };
}

function finestKink(kinksHz: Float64Array, slope: Float64Array, fLowHz: number, fHighHz: number, change: number): number {
  let finest = Infinity;
  for (let i = 0; i < kinksHz.length; i++) {
    const f = kinksHz[i]!;
    if (f <= fLowHz || f >= fHighHz) continue;
    const steep = Math.max(Math.abs(slope[i]!), Math.abs(slope[i + 1]!), 1);
    finest = Math.min(finest, (change * f) / steep);
  }
  return finest;
}

/**
 * 1/S ready for sums over bins: a closed form as a table fine enough to be exact, an uploaded curve as its own power laws.
 * Shape:  one weigher per curve; fill works on ranges of bins.
 * Units:  Hz in, 1/S in Hz out.
 * Error:  closed form: relative 2e-14 between nodes (checked while building); table: rounding.
 * Fails:  never inside the curve; a value that is not finite stays so and stops the claim later.
 * Source: settings.md rule 2.5: ln S is linear in ln f between points.
 */
export const noiseWeigher = (curve: NoiseCurve, halvings: number): NoiseWeigher =>
  curve.points === null || curve.points.length < 2 ? closedFormWeigher(curve, halvings) : tableWeigher(curve, curve.points);
