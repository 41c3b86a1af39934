import type { ReactNode } from 'react';
import { classes } from './classes';

interface TableProps {
  /** Says what the table holds; read by screen readers, seen when `captionSeen`. */
  readonly caption: string;
  readonly captionSeen?: boolean;
  readonly className?: string;
  /** `thead` and `tbody` elements; `.num` aligns a column of numbers. */
  readonly children: ReactNode;
}

/** A wide table scrolls inside its own frame, and the frame can be reached by keyboard. */
export function Table({ caption, captionSeen, className, children }: TableProps) {
  return (
    <div className="overflow-x-auto" tabIndex={0} role="group" aria-label={caption}>
      <table role="table" className={classes('tbl', className)}>
        <caption className={captionSeen ? 'pb-2' : 'sr-only'}>{caption}</caption>
        {children}
      </table>
    </div>
  );
}
