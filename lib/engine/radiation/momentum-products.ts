import { indexOfModes, type ModeProduct } from './mode-products';

type ModeName = { readonly l: number; readonly m: number };

const a = (l: number, m: number): number => Math.sqrt((l - m) * (l + m + 1)) / (l * (l + 1));
const b = (l: number, m: number): number => Math.sqrt(((l - 2) * (l + 2) * (l + m) * (l + m - 1)) / ((2 * l - 1) * (2 * l + 1))) / (2 * l);
const c = (l: number, m: number): number => (2 * m) / (l * (l + 1));
const d = (l: number, m: number): number => Math.sqrt(((l - 2) * (l + 2) * (l - m) * (l + m)) / ((2 * l - 1) * (2 * l + 1))) / l;

export type Components = readonly [x: readonly ModeProduct[], y: readonly ModeProduct[], z: readonly ModeProduct[]];

/**
 * Flux of linear momentum as products of news: Ṗ_x + iṖ_y couples (l, m) with (l or l ± 1, m + 1), Ṗ_z with (l or l ± 1, m).
 * Shape:  one list of products a component, for the modes given.
 * Units:  Ṗ in c⁴/G for dimensionless Ḣ.
 * Error:  closed form.
 * Fails:  never; partners that are not there contribute nothing.
 * Source: Q14; Ruiz et al. 2008, arXiv:0707.4654; checked against quadrature over the sphere in the tests.
 */
export function momentumProducts(modes: readonly ModeName[]): Components {
  const at = indexOfModes(modes);
  const [x, y, z]: [ModeProduct[], ModeProduct[], ModeProduct[]] = [[], [], []];
  modes.forEach(({ l, m }, i) => {
    const plus = (l2: number, size: number): void => {
      const j = at(l2, m + 1);
      if (j === null || size === 0) return;
      x.push({ a: i, b: j, re: size / (8 * Math.PI), im: 0 });
      y.push({ a: i, b: j, re: 0, im: -size / (8 * Math.PI) });
    };
    const along = (l2: number, size: number): void => {
      const j = at(l2, m);
      if (j !== null && size !== 0) z.push({ a: i, b: j, re: size / (16 * Math.PI), im: 0 });
    };
    plus(l, a(l, m));
    plus(l - 1, b(l, -m));
    plus(l + 1, -b(l + 1, m + 1));
    along(l, c(l, m));
    along(l - 1, d(l, m));
    along(l + 1, d(l + 1, m));
  });
  return [x, y, z];
}

const f = (l: number, m: number): number => Math.sqrt(l * (l + 1) - m * (m + 1));

/**
 * Flux of angular momentum as products of strain and news: J̇_z within a mode, J̇_x and J̇_y between m and m ± 1.
 * Shape:  one list of products a component, for the modes given; the left factor is H.
 * Units:  J̇ in M for H in r·h/M.
 * Error:  closed form.
 * Fails:  never; partners that are not there contribute nothing.
 * Source: Q13; Lousto & Zlochower 2007, gr-qc/0703061; Ruiz et al. 2008, arXiv:0707.4654.
 */
export function angularMomentumProducts(modes: readonly ModeName[]): Components {
  const at = indexOfModes(modes);
  const [x, y, z]: [ModeProduct[], ModeProduct[], ModeProduct[]] = [[], [], []];
  const factor = 1 / (32 * Math.PI);
  modes.forEach(({ l, m }, i) => {
    const [up, down] = [at(l, m + 1), at(l, m - 1)];
    if (up !== null) {
      x.push({ a: i, b: up, re: 0, im: -factor * f(l, m) });
      y.push({ a: i, b: up, re: -factor * f(l, m), im: 0 });
    }
    if (down !== null) {
      x.push({ a: i, b: down, re: 0, im: -factor * f(l, -m) });
      y.push({ a: i, b: down, re: factor * f(l, -m), im: 0 });
    }
    if (m !== 0) z.push({ a: i, b: i, re: 0, im: -2 * factor * m });
  });
  return [x, y, z];
}
