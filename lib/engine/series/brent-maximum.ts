export interface Top {
  readonly x: number;
  readonly value: number;
}

const GOLDEN = (3 - Math.sqrt(5)) / 2;
/** Parabolas need no narrower bracket than this part of the tolerance. */
const LEAST_STEP = 0.5;
const MOST_ROUNDS = 60;

/**
 * The maximum of a smooth function between two bounds, by parabolas where they help and golden sections where not.
 * Shape:  `start` lies between `low` and `high`; both bounds are looked at and may win.
 * Units:  those of x.
 * Error:  x to `tolerance`; the value quadratically better.
 * Fails:  never; the best point seen is returned. With several maxima inside it finds one of them.
 * Source: Brent 1973 (from memory).
 */
export function brentMaximum(f: (x: number) => number, low: number, high: number, start: number, tolerance: number): Top {
  let [a, b] = [low, high];
  const first = { x: Math.min(high, Math.max(low, start)), value: f(Math.min(high, Math.max(low, start))) };
  let [best, second, third]: [Top, Top, Top] = [first, first, first];
  let [step, before] = [0, 0];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const middle = (a + b) / 2;
    if (Math.abs(best.x - middle) <= 2 * tolerance - (b - a) / 2) break;
    const parabola = vertexStep(best, second, third);
    const inside = best.x + parabola > a + tolerance && best.x + parabola < b - tolerance;
    if (Number.isFinite(parabola) && inside && Math.abs(parabola) < Math.abs(before) / 2) [before, step] = [step, parabola];
    else {
      before = best.x >= middle ? a - best.x : b - best.x;
      step = GOLDEN * before;
    }
    if (Math.abs(step) < LEAST_STEP * tolerance) step = Math.sign(step || 1) * LEAST_STEP * tolerance;
    const next = { x: best.x + step, value: f(best.x + step) };
    if (next.value >= best.value) {
      if (next.x >= best.x) a = best.x;
      else b = best.x;
      [third, second, best] = [second, best, next];
    } else {
      if (next.x < best.x) a = next.x;
      else b = next.x;
      if (next.value >= second.value || second.x === best.x) [third, second] = [second, next];
      else if (next.value >= third.value || third.x === best.x || third.x === second.x) third = next;
    }
  }
  // Bracketing never asks the bounds themselves, and a maximum may stand on one.
  const ends = [low, high].filter((x) => Math.abs(x - best.x) < 4 * tolerance).map((x): Top => ({ x, value: f(x) }));
  return ends.reduce((top, end) => (end.value >= top.value ? end : top), best);
}

/** From the best of three points to the vertex of the parabola through them; NaN where they do not span one. */
function vertexStep(best: Top, second: Top, third: Top): number {
  const r = (best.x - second.x) * (best.value - third.value);
  const q = (best.x - third.x) * (best.value - second.value);
  const down = 2 * (q - r);
  return down === 0 ? Number.NaN : -((best.x - third.x) * q - (best.x - second.x) * r) / down;
}
