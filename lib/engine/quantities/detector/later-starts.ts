import { cutBefore, unitsPerM } from '@/lib/engine/budget/cut-start';
import { standardOf } from '@/lib/engine/budget/half-width';
import { numeral } from '@/lib/engine/budget/numeral';
import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import { houseValues } from '@/lib/engine/contract/house-values';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import type { OwnBudget } from './recipe';

/** In M. */
const MOVED = 50;

/** The record begun later than its burst ends, or than its first sample; null where that leaves too little. */
function begunLater(c: ConditionedWaveform, modes: Parameters<typeof conditionWaveform>[1], by: number): ConditionedWaveform | null {
  const perM = unitsPerM(c.given);
  if (perM === null) return null;
  const cut = cutBefore(c.given, (c.given.junkEndM ?? c.given.axis[0]!) + by * perM);
  return cut === null ? null : conditionWaveform(cut, modes);
}

/** All of one part begun later at once; null where one of them cannot be. */
function partBegunLater(request: PointRequest, part: 'signals' | 'templates', by: number): Partial<PointRequest> | null {
  const modes = request.declared.modes ?? houseValues.modes;
  const signals = request.signals ?? [request.a];
  const cut = (part === 'signals' ? signals : (request.templates ?? [])).map((c) => begunLater(c, modes, by));
  if (cut.some((c) => c === null)) return null;
  const whole = cut.filter((c) => c !== null);
  if (part === 'templates') return { templates: whole };
  return { a: whole[0]!, ...(request.signals === undefined ? {} : { signals: whole }) };
}

/**
 * E07 of quantities that take lists: all signals begun 50 M later, then all templates; whatever fits best stays what it is.
 * Shape:  one line.
 * Units:  the quantity's.
 * Error:  an estimate.
 * Fails:  null with the reason where a record cannot be cut.
 * Source: domain reference 5.1.
 */
export function startLines({ request, movedIn }: Pick<OwnBudget, 'request' | 'movedIn'>): BudgetLine[] {
  const base = { component: 'Start-up radiation', id: 'E07', group: 'coverage' } as const;
  const steps = [request.a, ...(request.signals ?? []), ...(request.templates ?? [])].some((c) => c.given.junkEndM !== null) ? [-MOVED, 0, MOVED] : [MOVED];
  const moves = (['signals', 'templates'] as const).map((part) =>
    steps.map((by) => partBegunLater(request, part, by)).flatMap((change) => (change === null ? [] : [movedIn(change)])).filter(Number.isFinite),
  );
  if (moves.some((list) => list.length === 0)) return [{ ...base, u: null, note: `Not available: a record is too short to begin ${MOVED} M later, or has no start.` }];
  const largest = moves.map((list) => Math.max(...list.map(Math.abs)));
  return [{ ...base, u: standardOf(Math.hypot(...largest)), note: `All signals begun ${MOVED} M later: ${moves[0]!.map((x) => numeral(x)).join(', ')}; all templates: ${moves[1]!.map((x) => numeral(x)).join(', ')}; half-widths over √3, in quadrature.` }];
}
