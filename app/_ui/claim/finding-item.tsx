import type { ReactNode } from 'react';
import type { Finding, FindingLevel } from '@/lib/engine/contract/finding';
import { classes } from '../primitives/classes';

const levels: Record<FindingLevel, { readonly word: string; readonly edge: string }> = {
  'stops-lodging': { word: 'Stops lodging', edge: 'edge-stop' },
  'needs-answer': { word: 'Needs an answer', edge: 'edge-ask' },
  'worth-a-look': { word: 'Worth a look', edge: 'edge-look' },
  note: { word: 'Note', edge: 'edge-note' },
};

interface FindingItemProps {
  readonly finding: Finding;
  /** What the authors answered. */
  readonly answer?: string | null;
  /** Buttons that do what `fix` says, or answer the finding. */
  readonly actions?: ReactNode;
}

/** A message about the data: level, where, what was seen, and the next step where one is known. */
export function FindingItem({ finding, answer, actions }: FindingItemProps) {
  const level = levels[finding.level];
  return (
    <div className={classes('edge grid gap-x-4 gap-y-0.5 border-t border-hair py-3 pl-3 text-ui first:border-t-0 sm:grid-cols-[118px_minmax(0,1fr)]', level.edge)}>
      <span className="font-semibold text-[color:var(--edge-word)]">{level.word}</span>
      <div className="min-w-0 max-w-[74ch]">
        <p><b>{finding.where}</b>: {finding.text}</p>
        {finding.fix && <p className="mt-1">{finding.fix}</p>}
        <p className="mt-1 font-code text-code text-ink-2">{finding.code}</p>
        {answer && <p className="mt-1 border-l-2 border-control pl-3"><b>The authors answer:</b> {answer}</p>}
        {actions && <div className="mt-2 flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}
