import Link from 'next/link';
import type { ReactNode } from 'react';
import type { Finding } from '@/lib/engine/contract/finding';
import { classes } from '../primitives/classes';
import { findingAnchor, findingLevels } from './finding-levels';
import { formatAt } from './setting-names';

interface FindingItemProps {
  readonly finding: Finding;
  /** What the authors answered. */
  readonly answer?: string | null;
  /** Buttons that do what `fix` says, or answer the finding. */
  readonly actions?: ReactNode;
}

/** A message about the data: level, where, what was seen, and the next step where one is known. */
export function FindingItem({ finding, answer, actions }: FindingItemProps) {
  const level = findingLevels[finding.level];
  return (
    <div className={classes('edge grid gap-x-4 gap-y-0.5 border-t border-hair py-3 pl-3 text-ui first:border-t-0 sm:grid-cols-[118px_minmax(0,1fr)]', level.edge)}>
      <span className="font-semibold text-[color:var(--edge-word)]">{level.word}</span>
      <div className="min-w-0 max-w-[74ch]">
        <p><b>{finding.where}{finding.at && `, at ${formatAt(finding.at)}`}</b>: {finding.text}</p>
        {finding.fix && <p className="mt-1">{finding.fix}</p>}
        <p className="font-code text-code"><Link href={`/methods/findings#${findingAnchor(finding.code)}`} className="inline-flex min-h-8 items-center text-ink-2">{finding.code}</Link></p>
        {answer && <p className="mt-1 border-l-2 border-control pl-3"><b>The authors answer:</b> {answer}</p>}
        {actions && <div className="mt-2 flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}
