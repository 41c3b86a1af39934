import type { ConventionGroup, ConventionId } from '@/lib/explain/conventions/convention';
import { priorWeight, type Commonness } from '@/lib/explain/conventions/convention';
import type { Flip, FlipChange } from '@/lib/explain/flip';
import type { JudgedClaim, JudgedPoint, Node, TriedNode } from '@/lib/explain/search/node';

const groupOf: Readonly<Record<ConventionId, ConventionGroup>> = {
  C01: 'noise', C02: 'noise', C03: 'noise', C35: 'noise', C36: 'noise', C40: 'noise', C04: 'band', C05: 'band', C37: 'band', C06: 'maximisation', C07: 'maximisation',
  C09: 'angle', C10: 'angle', C15: 'angle', C16: 'angle', C11: 'mass', C12: 'mass', C13: 'mass', C17: 'mass', C19: 'variable', C20: 'variable', C24: 'modes', C25: 'modes', C31: 'integration', C32: 'integration', C33: 'units', C46: 'units', C55: 'units',
};
const rare = new Set(['C36', 'C55']);
const most = new Set(['C01', 'C04', 'C06', 'C11', 'C15', 'C19', 'C25', 'C31', 'C32']);
const commonness = (convention: ConventionId): Commonness => (most.has(convention) ? 'most' : rare.has(convention) ? 'rare' : 'regular');

/** A flip as the catalogue would make it: `C04:fLowHz=30`, with group and weight of its convention. */
export function flipOf(id: string, more: Partial<Flip> = {}): Flip {
  const convention = id.split(':')[0] as ConventionId;
  const change: FlipChange = { kind: 'rerun', settings: {} };
  return {
    id, convention, clause: `${id} holds`, kind: (more.change ?? change).kind, group: groupOf[convention] ?? 'units', prior: priorWeight[commonness(convention)], common: commonness(convention) === 'most',
    assumed: false, evidence: 'none', evidenceFrom: null, inFile: false, change, declares: {}, ...more,
  };
}

export const factorFlip = (id: string, factor: number, more: Partial<Flip> = {}): Flip => flipOf(id, { change: { kind: 'factor', factor }, ...more });

export const single = (flip: Flip): Node => ({ id: flip.id, flips: [flip] });

/** A reading of one flip, with its numbers claim by claim. */
export const triedOf = (flip: Flip, predictions: Readonly<Record<string, readonly (number | null)[] | string>>): TriedNode => triedNode(single(flip), predictions);

export const triedNode = (node: Node, predictions: Readonly<Record<string, readonly (number | null)[] | string>>): TriedNode => ({
  node,
  predictions: new Map(Object.entries(predictions).map(([claim, given]) => [claim, typeof given === 'string' ? { because: given } : { values: given }])),
});

/** A claim that differs, printed to three digits behind the point unless said otherwise. */
export function claimOf(id: string, points: readonly (Partial<JudgedPoint> & Pick<JudgedPoint, 'claimed' | 'value'>)[], more: Partial<JudgedClaim> = {}): JudgedClaim {
  return { id, quantity: 'snr', law: 'size', scale: 'ln', wanting: true, points: points.map((point) => ({ at: {}, halfDigit: 0, tolerance: 0.003, expandedUncertainty: 1e-4, ...point })), ...more };
}
