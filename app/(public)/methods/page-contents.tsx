import { classes } from '@/app/_ui/primitives/classes';

interface PageContentsProps {
  readonly entries: readonly { readonly id: string; readonly label: string }[];
  /** Before the page at every width: wide tables leave no room beside them. */
  readonly across?: boolean;
}

/** The way through a long page: beside it where there is room, before it where there is none. */
export function PageContents({ entries, across = false }: PageContentsProps) {
  return (
    <nav aria-label="On this page" className={classes('text-ui', !across && 'mid:sticky mid:top-6 mid:self-start')}>
      <p className="text-small font-semibold text-ink-2">On this page</p>
      <ul className={across ? 'mt-1 flex flex-wrap gap-x-4' : 'mt-1 max-mid:flex max-mid:flex-wrap max-mid:gap-x-4'}>
        {entries.map((entry) => <li key={entry.id}><a href={`#${entry.id}`} className="inline-flex min-h-8 items-center">{entry.label}</a></li>)}
      </ul>
    </nav>
  );
}
