/** A method page as written in `content/`: text that is versioned with the code it describes. */
export interface MethodPage {
  readonly id: string;
  readonly title: string;
  /** The sentence under the title. */
  readonly summary: string;
  /** What stands before the first heading, the summary left out. */
  readonly lead: string;
  readonly sections: readonly MethodSection[];
  /** What a setting changes here, by its name; type, range and default are the engine's own. */
  readonly notes: ReadonlyMap<string, string>;
}
export interface MethodSection {
  /** Anchor on the page. */
  readonly id: string;
  readonly heading: string;
  readonly body: string;
}

export const SETTINGS_HEADING = 'Settings';

export const anchorOf = (heading: string): string =>
  heading.normalize('NFKD').toLowerCase().replace(/[^\p{L}\p{N}]+/gu, '-').replace(/^-|-$/g, '');

export function parseMethodPage(id: string, source: string): MethodPage {
  const [, title = id, rest = source] = /^#\s+(.+?)\s*\n([\s\S]*)$/.exec(source) ?? [];
  const [head = '', ...parts] = rest.split(/^## /m);
  const [summary = '', ...lead] = head.trim().split(/\n\s*\n/);
  const sections = parts.map((part) => {
    const [heading = '', ...body] = part.split('\n');
    return { id: anchorOf(heading), heading: heading.trim(), body: body.join('\n').trim() };
  });
  return { id, title, summary, lead: lead.join('\n\n'), sections, notes: notesOf(sections.find((section) => section.heading === SETTINGS_HEADING)?.body ?? '') };
}

/** Lines such as ``- `modes, lMax`: what they change``. */
function notesOf(body: string): ReadonlyMap<string, string> {
  const lines = [...body.matchAll(/^- `([\w, ]+)`: (.+)$/gm)];
  return new Map(lines.flatMap(([, names = '', text = '']) => names.split(/,\s*/).map((name) => [name, text] as const)));
}
