import type { ReactNode } from 'react';

interface StackedTableProps {
  readonly caption: string;
  readonly columns: readonly { readonly title: string; readonly width?: string; readonly hidden?: boolean }[];
  /** `StackedRow` elements. */
  readonly children: ReactNode;
}

/**
 * A list of submissions: a table where there is room, and one card a row where there is not. The
 * roles are written out, because a browser forgets them when the boxes stop being a table's.
 */
export function StackedTable({ caption, columns, children }: StackedTableProps) {
  return (
    <table role="table" className="block w-full rounded border border-hair-2 bg-sheet text-ui lg:table lg:table-fixed lg:border-separate lg:border-spacing-0">
      <caption className="sr-only">{caption}</caption>
      <thead role="rowgroup" className="sr-only lg:not-sr-only lg:table-header-group">
        <tr role="row">
          {columns.map(({ title, width, hidden }) => (
            <th key={title} role="columnheader" scope="col" className={`px-4 py-2 text-left text-small font-semibold text-ink-2 ${width ?? ''}`}>{hidden ? <span className="sr-only">{title}</span> : title}</th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="block lg:table-row-group">{children}</tbody>
    </table>
  );
}

const cell = 'block min-w-0 lg:table-cell lg:border-t lg:border-hair lg:px-4 lg:py-3 lg:align-top';

export const StackedRow = ({ children }: { readonly children: ReactNode }) => (
  <tr role="row" className="grid gap-2 border-t border-hair px-4 py-3 first:border-t-0 lg:table-row lg:p-0">{children}</tr>
);

export const HeadCell = ({ children }: { readonly children: ReactNode }) => <th role="rowheader" scope="row" className={`${cell} text-left font-normal`}>{children}</th>;

export const Cell = ({ last, children }: { readonly last?: boolean; readonly children: ReactNode }) => <td role="cell" className={`${cell} ${last ? 'lg:text-right' : ''}`}>{children}</td>;
