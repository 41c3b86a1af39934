/**
 * Weights 1/∏(x_a − x_b) of eight neighbouring points, each difference taken once.
 * Shape:  points at … at + 7 of x, which rises strictly; eight weights into w.
 * Units:  those of x to the power −7.
 * Error:  rounding.
 * Fails:  never.
 * Source: barycentric weights, definition.
 */
export function weightsOfEight(x: Float64Array, at: number, w: Float64Array): void {
  const a = x[at]!;
  const b = x[at + 1]!;
  const c = x[at + 2]!;
  const d = x[at + 3]!;
  const e = x[at + 4]!;
  const f = x[at + 5]!;
  const g = x[at + 6]!;
  const h = x[at + 7]!;
  const ab = a - b;
  const ac = a - c;
  const ad = a - d;
  const ae = a - e;
  const af = a - f;
  const ag = a - g;
  const ah = a - h;
  const bc = b - c;
  const bd = b - d;
  const be = b - e;
  const bf = b - f;
  const bg = b - g;
  const bh = b - h;
  const cd = c - d;
  const ce = c - e;
  const cf = c - f;
  const cg = c - g;
  const ch = c - h;
  const de = d - e;
  const df = d - f;
  const dg = d - g;
  const dh = d - h;
  const ef = e - f;
  const eg = e - g;
  const eh = e - h;
  const fg = f - g;
  const fh = f - h;
  const gh = g - h;
  w[0] = 1 / (ab * ac * ad * ae * af * ag * ah);
  w[1] = -1 / (ab * bc * bd * be * bf * bg * bh);
  w[2] = 1 / (ac * bc * cd * ce * cf * cg * ch);
  w[3] = -1 / (ad * bd * cd * de * df * dg * dh);
  w[4] = 1 / (ae * be * ce * de * ef * eg * eh);
  w[5] = -1 / (af * bf * cf * df * ef * fg * fh);
  w[6] = 1 / (ag * bg * cg * dg * eg * fg * gh);
  w[7] = -1 / (ah * bh * ch * dh * eh * fh * gh);
}

/** Two series on one axis, and where the values at one point go: to places k of two arrays. */
export interface EightPoints {
  readonly axis: Float64Array;
  readonly first: Float64Array;
  readonly second: Float64Array;
  readonly outFirst: Float64Array;
  readonly outSecond: Float64Array;
}

/**
 * The polynomials through eight points from `at` on, read at t: products from both sides, so that nothing is divided by.
 * Shape:  w as `weightsOfEight` leaves it; one value of each series goes to place k.
 * Units:  those of the series.
 * Error:  order 8 in the spacing of the points.
 * Fails:  never; t may be a point.
 * Source: Lagrange, first barycentric form, its weights normalised to 1.
 */
export function readEight({ axis: x, first: u, second: v, outFirst, outSecond }: EightPoints, at: number, w: Float64Array, t: number, k: number): void {
  const d0 = t - x[at]!;
  const d1 = t - x[at + 1]!;
  const d2 = t - x[at + 2]!;
  const d3 = t - x[at + 3]!;
  const d4 = t - x[at + 4]!;
  const d5 = t - x[at + 5]!;
  const d6 = t - x[at + 6]!;
  const d7 = t - x[at + 7]!;
  const l2 = d0 * d1;
  const r5 = d6 * d7;
  const l3 = l2 * d2;
  const r4 = r5 * d5;
  const l4 = l3 * d3;
  const r3 = r4 * d4;
  const l5 = l4 * d4;
  const r2 = r3 * d3;
  const l6 = l5 * d5;
  const r1 = r2 * d2;
  const p0 = w[0]! * (r1 * d1);
  const p1 = w[1]! * (d0 * r1);
  const p2 = w[2]! * (l2 * r2);
  const p3 = w[3]! * (l3 * r3);
  const p4 = w[4]! * (l4 * r4);
  const p5 = w[5]! * (l5 * r5);
  const p6 = w[6]! * (l6 * d7);
  const p7 = w[7]! * (l6 * d6);
  const unit = 1 / (p0 + p1 + p2 + p3 + p4 + p5 + p6 + p7);
  outFirst[k] = unit * (p0 * u[at]! + p1 * u[at + 1]! + p2 * u[at + 2]! + p3 * u[at + 3]! + p4 * u[at + 4]! + p5 * u[at + 5]! + p6 * u[at + 6]! + p7 * u[at + 7]!);
  outSecond[k] = unit * (p0 * v[at]! + p1 * v[at + 1]! + p2 * v[at + 2]! + p3 * v[at + 3]! + p4 * v[at + 4]! + p5 * v[at + 5]! + p6 * v[at + 6]! + p7 * v[at + 7]!);
}
