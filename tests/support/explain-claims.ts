import { pairPrediction, pairsOf } from '@/lib/explain/search/pairs';
import type { JudgedClaim, JudgedPoint, TriedNode } from '@/lib/explain/search/node';
import { drawn, lawAt } from '@/lib/explain/search/unexplained';
import { single } from './explain-flips';
import type { PredictionTable } from './explain-tables';

/** Claims made up on a table, and what was planted in them; nothing where their gap is unexplained. */
export interface MadeSheet {
  readonly claims: readonly JudgedClaim[];
  readonly tried: readonly TriedNode[];
  readonly planted: string | null;
}

type Random = () => number;
const chosen = <T>(items: readonly T[], random: Random): T => items[Math.floor(random() * items.length)]!;
const normal = (random: Random): number => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

/** Some points of the table, in their order. */
function pointsOf(table: PredictionTable, count: number, random: Random): number[] {
  const all = table.at.map((_, i) => i);
  while (all.length > count) all.splice(Math.floor(random() * all.length), 1);
  return all;
}

/** Readings of the table at these points: every flip, and every pair of which one is a factor. */
export function triedAt(table: PredictionTable, points: readonly number[]): TriedNode[] {
  const given = new Map(table.flips.map(({ flip, values }) => [flip.id, points.map((i) => values[i]!)]));
  const declared: JudgedClaim = { id: 'C1', quantity: table.quantity, law: table.law, scale: table.scale, wanting: true, points: points.map((i) => ({ at: {}, claimed: table.declared[i]!, value: table.declared[i]!, halfDigit: 0, tolerance: 0, expandedUncertainty: 0 })) };
  const singles = table.flips.map(({ flip }): TriedNode => ({ node: single(flip), predictions: new Map([['C1', { values: given.get(flip.id)! }]]) }));
  const pairs = pairsOf(table.flips.map(({ flip }) => flip)).filter(({ flips }) => flips.some(({ change }) => change.kind === 'factor'));
  const pairNodes = pairs.map((node): TriedNode => ({ node, predictions: new Map([['C1', pairPrediction(declared, { values: given.get(node.flips[0].id)! }, { values: given.get(node.flips[1]!.id)! })]]) }));
  return [...singles, ...pairNodes];
}

/** The number as its author prints it: the last place near the tolerance or up to two finer. */
function printed(number: number, table: PredictionTable, finer: number, random: Random): Pick<JudgedPoint, 'claimed' | 'halfDigit' | 'tolerance' | 'expandedUncertainty'> {
  const natural = table.tolerance(number);
  const unit = 10 ** (Math.floor(Math.log10(natural)) - finer);
  const claimed = Math.round(number / unit) * unit;
  const tolerance = table.tolerance(claimed) + unit / 2;
  return { claimed, halfDigit: unit / 2, tolerance, expandedUncertainty: tolerance * 10 ** (-4 + 3.7 * random()) };
}

function assembled(table: PredictionTable, points: readonly number[], numbers: readonly number[], random: Random): JudgedClaim {
  const finer = Math.floor(3 * random());
  const judged = points.map((i, k): JudgedPoint => ({ at: table.at[i]!, value: table.declared[i]!, ...printed(numbers[k]!, table, finer, random) }));
  return { id: 'C1', quantity: table.quantity, law: table.law, scale: table.scale, wanting: true, points: judged };
}

const differs = ({ points }: JudgedClaim): boolean => points.some(({ claimed, value, tolerance, expandedUncertainty }) => Math.abs(claimed - value) > tolerance + expandedUncertainty);

/** Claimed numbers that nothing explains, each drawn by itself from the law of decoys. */
export function unexplainedClaim(tables: readonly PredictionTable[], count: number, random: Random): MadeSheet {
  for (;;) {
    const table = chosen(tables, random);
    const points = pointsOf(table, count, random);
    const plain = assembled(table, points, points.map((i) => table.declared[i]!), random);
    const claim = assembled(table, points, plain.points.map((point) => drawn(lawAt(plain, point), random())), random);
    if (differs(claim)) return { claims: [claim], tried: triedAt(table, points), planted: null };
  }
}

/** Two claims of one number each, on the same files: what explains one may explain the other. */
export function unexplainedPair(tables: readonly PredictionTable[], random: Random): MadeSheet {
  const table = chosen(tables, random);
  const [first, second] = [0, 1].map(() => unexplainedClaim([table], 1, random)) as [MadeSheet, MadeSheet];
  const other = new Map(second.tried.map(({ node, predictions }) => [node.id, predictions.get('C1')!]));
  return { claims: [first.claims[0]!, { ...second.claims[0]!, id: 'C2' }], tried: first.tried.map(({ node, predictions }) => ({ node, predictions: new Map([...predictions, ['C2', other.get(node.id)!]]) })), planted: null };
}

/** The share of the natural tolerance by which two careful computations part. */
const SCATTER = 1 / 6;

/** Claimed numbers of somebody who read one convention otherwise, with numerics of their own; the effect exceeds T + U. */
export function plantedClaim(tables: readonly PredictionTable[], count: number, random: Random): MadeSheet {
  for (;;) {
    const table = chosen(tables, random);
    const points = pointsOf(table, count, random);
    const { flip, values } = chosen(table.flips, random);
    const numbers = points.map((i) => values[i]!);
    if (numbers.some((y) => !Number.isFinite(y) || y === null || y === 0)) continue;
    const own = normal(random) * SCATTER;
    const claim = assembled(table, points, numbers.map((y) => y + own * table.tolerance(y)), random);
    if (differs(claim)) return { claims: [claim], tried: triedAt(table, points), planted: flip.id };
  }
}
