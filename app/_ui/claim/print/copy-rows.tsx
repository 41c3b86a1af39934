'use client';
import { Button } from '../../primitives/button';
import { Icon } from '../../primitives/icon';
import { CopyByHand, useCopy } from './copy-text';

interface CopyRowsProps {
  readonly claimId: string;
  /** What differs from row to row, and what all end with: a long sweep is not sent to the browser many times over. */
  readonly own: readonly string[];
  readonly shared: string;
  readonly columns: string;
}

/** All points of a sweep as rows of one table. */
export function CopyRows({ claimId, own, shared, columns }: CopyRowsProps) {
  const { copy, refused, forget } = useCopy();
  const what = `${own.length} LaTeX rows of ${claimId}`;
  return (
    <>
      <Button size="low" icon={<Icon name="copy" className="size-3.5" />} onClick={() => void copy([columns, ...own.map((row) => row + shared)].join('\n'), `the ${what}`)}>Copy all {what}</Button>
      {refused && <CopyByHand {...refused} onClose={forget} />}
    </>
  );
}
