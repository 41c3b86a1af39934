'use client';
import { Menu as Base } from '@base-ui/react/menu';
import Link from 'next/link';
import type { Route } from 'next';
import type { ReactElement, ReactNode } from 'react';

export type MenuEntry =
  | { readonly kind: 'link'; readonly label: ReactNode; readonly href: string }
  | { readonly kind: 'act'; readonly label: ReactNode; readonly onSelect: () => void; readonly disabled?: boolean }
  | { readonly kind: 'rule' }
  | { readonly kind: 'heading'; readonly label: string };

const item = 'flex min-h-9 w-full cursor-pointer items-center gap-2 px-4 py-1.5 text-left text-ui text-ink no-underline outline-none data-disabled:text-ink-2 data-highlighted:bg-hover';

function Entry({ entry }: { readonly entry: MenuEntry }) {
  if (entry.kind === 'rule') return <Base.Separator className="my-1 border-t border-hair" />;
  if (entry.kind === 'heading') return <div className="px-4 pt-2 pb-1 text-small text-ink-2">{entry.label}</div>;
  if (entry.kind === 'link') return <Base.LinkItem className={item} render={<Link href={entry.href as Route} />}>{entry.label}</Base.LinkItem>;
  return <Base.Item className={item} disabled={entry.disabled} onClick={entry.onSelect}>{entry.label}</Base.Item>;
}

export function Menu({ trigger, entries }: { readonly trigger: ReactElement<Record<string, unknown>>; readonly entries: readonly MenuEntry[] }) {
  return (
    <Base.Root modal={false}>
      <Base.Trigger render={trigger} />
      <Base.Portal>
        <Base.Positioner sideOffset={4} align="end" className="z-30 outline-none">
          <Base.Popup className="min-w-48 rounded border border-control bg-sheet py-1 outline-none">
            {entries.map((entry, i) => <Entry key={i} entry={entry} />)}
          </Base.Popup>
        </Base.Positioner>
      </Base.Portal>
    </Base.Root>
  );
}
