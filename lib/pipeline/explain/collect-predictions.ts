import { houseValues } from '@/lib/engine/contract/house-values';
import { Cancelled } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Flip } from '@/lib/explain/flip';
import { fits } from '@/lib/explain/search/fits';
import type { Node, Prediction, TriedNode } from '@/lib/explain/search/node';
import { pairPrediction, pairsOf, singlesOf } from '@/lib/explain/search/pairs';
import { budget, costOf } from './cost';
import { factorsAt, rerunOf, rerunsOf, type Rerun } from './node-values';
import { predict, type Asking } from './predict';
import type { Subject } from './subject';

/** What the search went through, and what it left for want of time. */
export interface Collected {
  readonly tried: readonly TriedNode[];
  /** Claim id → nodes that apply and were not tried. */
  readonly left: ReadonlyMap<string, number>;
  readonly stoppedBecause: string | null;
}

export interface Collecting extends Asking {
  /** Why the search is to end where it stands; null while it may go on. */
  readonly endedBy: () => string | null;
  readonly onProgress: (fraction: number, doing: string) => void;
}

/** Assumed readings first, those that cost nothing before those that do, the likelier before the less. */
const inOrder = (p: Flip, q: Flip): number =>
  Number(q.assumed) - Number(p.assumed) || Number(p.change.kind === 'rerun') - Number(q.change.kind === 'rerun') || q.prior - p.prior || (p.id < q.id ? -1 : p.id > q.id ? 1 : 0);

const priorOf = ({ flips }: Node): number => flips.reduce((all, { prior }) => all * prior, 1);
const likelierFirst = (p: Node, q: Node): number => priorOf(q) - priorOf(p) || (p.id < q.id ? -1 : 1);

/** Of the claim as it would be asked: the changed maximum and response, else the declared ones, else those of the house. */
function costUnder({ claim, inputs, points }: Subject['asked'], changes: readonly Rerun[]): number {
  const changed = Object.assign({}, ...changes.map(({ settings }) => settings)) as DeclaredSettings;
  const maximises = claim.quantity.settings.includes('maximise');
  const maximise = maximises ? (changed.maximise ?? claim.settings.maximise ?? houseValues.maximise) : [];
  return costOf(claim, inputs, points.length, maximise, (changed.response ?? claim.settings.response) === 'complex');
}

export class PredictionCollector {
  private readonly nodes = new Map<string, { readonly node: Node; readonly predictions: Map<string, Prediction> }>();
  private readonly left = new Map<string, number>();
  private readonly spent = new Map<string, number>();
  private units = 0;
  private stopped: string | null = null;

  constructor(
    private readonly subjects: readonly Subject[],
    private readonly how: Collecting,
  ) {}

  collect(): Collected {
    // Asked before any progress is told: from here on an end keeps what there is.
    this.stopped = this.how.endedBy();
    const wanting = this.subjects.filter(({ judged }) => judged.wanting);
    wanting.forEach((subject, k) => {
      this.singles(subject, (share) => this.how.onProgress((0.7 * (k + share)) / wanting.length, `${subject.judged.id}: other readings`));
      this.pairs(subject);
    });
    this.others(wanting);
    return { tried: [...this.nodes.values()], left: this.left, stoppedBecause: this.stopped };
  }

  private singles(subject: Subject, onShare: (share: number) => void): void {
    const nodes = singlesOf(subject.flips).sort((p, q) => inOrder(p.flips[0], q.flips[0]));
    nodes.forEach((node, k) => {
      onShare(k / nodes.length);
      this.ask(subject, node);
    });
  }

  /** A pair is put together from its parts where one of them is a factor; else it is another rerun. */
  private pairs(subject: Subject): void {
    for (const node of pairsOf(subject.flips).sort(likelierFirst)) {
      const [a, b] = node.flips.map((flip) => this.nodes.get(flip.id)?.predictions.get(subject.judged.id));
      if (rerunsOf(node).length < 2) {
        if (a !== undefined && b !== undefined) this.keep(node, subject, pairPrediction(subject.judged, a, b));
        continue;
      }
      if (a === undefined || b === undefined || 'because' in a || 'because' in b) continue;
      this.ask(subject, node);
    }
  }

  /** What fits one claim is asked of the others, which it may explain or break. */
  private others(wanting: readonly Subject[]): void {
    const fitting = [...this.nodes.values()].filter(({ predictions }) => wanting.some(({ judged }) => fits(judged, predictions.get(judged.id))));
    for (const { node } of fitting)
      for (const subject of this.subjects) {
        const flips = node.flips.map(({ id }) => subject.flips.find((flip) => flip.id === id));
        if (flips.some((flip) => flip === undefined)) continue;
        const own = flips as unknown as Node['flips'];
        if (!this.nodes.get(node.id)?.predictions.has(subject.judged.id)) this.ask(subject, { id: node.id, flips: own }, true);
      }
  }

  private keep(node: Node, { judged }: Subject, prediction: Prediction): void {
    const known = this.nodes.get(node.id) ?? { node, predictions: new Map<string, Prediction>() };
    known.predictions.set(judged.id, prediction);
    this.nodes.set(node.id, known);
  }

  private ask(subject: Subject, node: Node, always = false): void {
    const changes = rerunsOf(node);
    if (changes.length === 0 || this.mayRerun(subject, changes, always)) this.keep(node, subject, this.predicted(subject, node, changes));
    else this.left.set(subject.judged.id, (this.left.get(subject.judged.id) ?? 0) + 1);
  }

  private mayRerun({ asked, judged }: Subject, changes: readonly Rerun[], always: boolean): boolean {
    if (this.how.watch.cancelled()) throw new Cancelled();
    this.stopped ??= this.how.endedBy();
    if (this.stopped !== null) return false;
    const cost = costUnder(asked, changes);
    const spent = this.spent.get(judged.id) ?? 0;
    if ((!always && spent >= budget.reruns) || cost > budget.unitsEach || this.units + cost > budget.units) return false;
    this.units += cost;
    if (!always) this.spent.set(judged.id, spent + 1);
    return true;
  }

  private predicted({ asked, judged }: Subject, node: Node, changes: readonly Rerun[]): Prediction {
    const base: Prediction = changes.length === 0 ? { values: judged.points.map(({ value }) => value) } : predict(asked, rerunOf(node), this.how);
    if ('because' in base) return base;
    return { values: base.values.map((value, k) => (value === null ? null : value * factorsAt(node, asked.points[k] ?? -1))) };
  }
}
