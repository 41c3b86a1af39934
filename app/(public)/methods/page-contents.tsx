/** The way through a long page: beside it where there is room, before it where there is none. */
export function PageContents({ entries }: { readonly entries: readonly { readonly id: string; readonly label: string }[] }) {
  return (
    <nav aria-label="On this page" className="text-ui mid:sticky mid:top-6 mid:self-start">
      <p className="text-small font-semibold text-ink-2">On this page</p>
      <ul className="mt-1 max-mid:flex max-mid:flex-wrap max-mid:gap-x-4">
        {entries.map((entry) => <li key={entry.id}><a href={`#${entry.id}`} className="inline-flex min-h-8 items-center">{entry.label}</a></li>)}
      </ul>
    </nav>
  );
}
