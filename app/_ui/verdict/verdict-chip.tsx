import type { ReactNode } from 'react';
import { classes } from '../primitives/classes';
import { VerdictShape } from './verdict-shape';
import { verdictLooks, type VerdictState, type VerdictTone } from './verdict-words';

export const toneText: Record<VerdictTone, string> = { agrees: 'text-agrees', differs: 'text-differs', unsettled: 'text-unsettled', notcomp: 'text-notcomp', waiting: 'text-waiting' };

const frames: Record<VerdictState, string> = {
  agrees: 'border bg-agrees-tint border-[color-mix(in_srgb,currentColor_55%,transparent)]',
  differs: 'border bg-differs-tint border-[color-mix(in_srgb,currentColor_55%,transparent)]',
  unsettled: 'border bg-unsettled-tint border-[color-mix(in_srgb,currentColor_55%,transparent)]',
  'not-computable': 'border border-dashed border-current',
  'routes-disagree': 'border-3 border-double border-current py-0',
  waiting: 'border border-dotted border-current',
};

interface VerdictChipProps {
  readonly state: VerdictState;
  /** Said in place of the verdict's own word, e.g. `Route B, 64 %`. Only for waiting. */
  readonly children?: ReactNode;
  /** No frame: in running text and dense lists. */
  readonly bare?: boolean;
}

export function VerdictChip({ state, children, bare }: VerdictChipProps) {
  const look = verdictLooks[state];
  return (
    <span className={classes('verdict inline-flex items-center gap-[7px] whitespace-nowrap text-ui font-semibold', toneText[look.tone], bare ? 'min-h-5' : classes('min-h-6 rounded py-px pr-[9px] pl-[7px]', frames[state]))}>
      <VerdictShape state={state} />
      {state === 'waiting' && children ? children : look.word}
    </span>
  );
}

/** One shape a claim, in the claims' order; said once as a count. */
export function VerdictStrip({ verdicts }: { readonly verdicts: readonly { readonly id: string; readonly verdict: VerdictState }[] }) {
  const label = verdicts.map(({ id, verdict }) => `${id} ${verdictLooks[verdict].word.toLowerCase()}`).join(', ');
  return (
    <span role="img" aria-label={label || 'no claims yet'} className="inline-flex flex-wrap gap-[5px] align-middle">
      {verdicts.map(({ id, verdict }) => <VerdictShape key={id} state={verdict} className={classes('size-[18px]', toneText[verdictLooks[verdict].tone])} />)}
    </span>
  );
}

const remarkWords: Record<string, string> = {
  'digits-overstated': 'digits overstated',
  'narrower-scope': 'narrower scope',
  'lower-bound-only': 'lower bound only',
};
export const remarkWord = (remark: string): string => remarkWords[remark] ?? remark;

export const Remark = ({ remark }: { readonly remark: string }) => <span className="remark">{remarkWord(remark)}</span>;
