import type { FlipChange } from '@/lib/explain/flip';
import type { Node } from '@/lib/explain/search/node';
import { joined } from './predict';

export type Rerun = Extract<FlipChange, { kind: 'rerun' }>;

export const rerunsOf = (node: Node): Rerun[] => node.flips.map(({ change }) => change).filter((change) => change.kind === 'rerun');

/** What a node puts to the engine; nothing where it is factors alone. */
export const rerunOf = (node: Node): Rerun => joined([{ kind: 'rerun', settings: {} }, ...rerunsOf(node)]);

/** The product of a node's factors at one point of the claim. */
export const factorsAt = ({ flips }: Node, point: number): number =>
  flips.reduce((all, { change }) => (change.kind === 'rerun' ? all : all * (typeof change.factor === 'number' ? change.factor : (change.factor[point] ?? Number.NaN))), 1);
