import { anchorOf } from '../parse-method-page';

export interface GlossaryTerm {
  /** Anchor: `/methods/glossary#route-a-route-b`. */
  readonly id: string;
  /** Further anchors, one for each word of a row that names several. */
  readonly also: readonly string[];
  /** Markdown, as is the meaning. */
  readonly term: string;
  readonly meaning: string;
}
export interface GlossaryPart {
  readonly id: string;
  readonly heading: string;
  readonly terms: readonly GlossaryTerm[];
}
export interface Glossary {
  readonly title: string;
  readonly lead: string;
  readonly parts: readonly GlossaryPart[];
}

/** The glossary is Markdown, so that it can be read where it lies; here its rows get an anchor each. */
export function parseGlossary(source: string): Glossary {
  const [head = '', ...parts] = source.split(/^## /m);
  const [, title = 'Glossary', lead = ''] = /^#\s+(.+?)\s*\n([\s\S]*)$/.exec(head) ?? [];
  return { title, lead: lead.trim(), parts: parts.map(parsePart) };
}

function parsePart(part: string): GlossaryPart {
  const [heading = ''] = part.split('\n');
  // A bar inside a cell is written with a backslash before it.
  const rows = [...part.matchAll(/^\| ((?:\\\||[^|\n])+?) \| ((?:\\\||[^|\n])+?) \|$/gm)];
  return { id: anchorOf(heading), heading: heading.trim(), terms: rows.slice(1).map(([, term = '', meaning = '']) => asTerm(term, meaning)) };
}

function asTerm(term: string, meaning: string): GlossaryTerm {
  const plain = (text: string): string => anchorOf(text.replace(/[*`\\|⟨⟩]/g, ' '));
  const id = plain(term);
  const also = term.split(/,(?![^()]*\))/).map(plain).filter((anchor) => anchor !== '' && anchor !== id);
  return { id, also: [...new Set(also)], term: term.replaceAll('\\|', '|'), meaning: meaning.replaceAll('\\|', '|') };
}
