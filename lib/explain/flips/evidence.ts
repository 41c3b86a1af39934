import type { Evidence } from '../flip';
import type { Written } from './flip-context';

/** What to look for: words that speak for the other reading, and words that speak for the one declared. */
export interface Telling {
  readonly supports?: readonly RegExp[];
  readonly contradicts?: readonly RegExp[];
}

export interface Found {
  readonly evidence: Evidence;
  readonly evidenceFrom: string | null;
  readonly inFile: boolean;
}

interface Passage {
  readonly words: string;
  readonly inFile: boolean;
}

/** Letters on either side of the words found. */
const AROUND = 40;

/** So many letters on either side, less the words that they cut. */
function wholeWords(text: string, from: number, length: number, around: number): readonly [start: number, end: number] {
  const [start, end] = [Math.max(0, from - around), Math.min(text.length, from + length + around)];
  const [before, after] = [text.slice(start, from), text.slice(from + length, end)];
  const [first, last] = [start > 0 ? before.search(/\s/) : 0, end < text.length ? after.search(/\s\S*$/) : after.length];
  return [first < 0 ? from - before.length : start + first, last < 0 ? end : from + length + last];
}

/** The words found with a little of what stands around them, on one line. */
function quoted({ where, text, saysWhose }: Written, from: number, length: number): string {
  const around = saysWhose === true ? 0 : AROUND;
  const [start, end] = wholeWords(text, from, length, around);
  // A formula cut in the middle is no words.
  const words = text.slice(start, end).replace(/\${1,2}[^$]*(?:\${1,2}|$)/g, '…').replace(/\s+/g, ' ').trim();
  const passage = `${start > 0 ? '…' : ''}${words}${end < text.length ? '…' : ''}`;
  return `${where}: “${passage.replace(/…(?:\s*…)+/g, '…')}”`;
}

/** Heads of files before the statement. */
function firstWith(texts: readonly Written[], patterns: readonly RegExp[] = []): Passage | undefined {
  for (const written of [...texts].sort((p, q) => Number(q.inFile) - Number(p.inFile)))
    for (const pattern of patterns) {
      const found = pattern.exec(written.text);
      if (found) return { words: quoted(written, found.index, found[0].length), inFile: written.inFile };
    }
  return undefined;
}

/** Words on both sides settle nothing. */
export function evidenceIn(texts: readonly Written[], telling: Telling): Found {
  const speaksFor = firstWith(texts, telling.supports);
  const speaksAgainst = firstWith(texts, telling.contradicts);
  if (speaksFor !== undefined && speaksAgainst === undefined) return { evidence: 'supports', evidenceFrom: speaksFor.words, inFile: speaksFor.inFile };
  if (speaksAgainst !== undefined && speaksFor === undefined) return { evidence: 'contradicts', evidenceFrom: speaksAgainst.words, inFile: speaksAgainst.inFile };
  return { evidence: 'none', evidenceFrom: null, inFile: false };
}

const escaped = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, String.raw`\$&`);

/** A number followed by its unit, and no digit before it. */
export const measured = (value: number, unit: string): RegExp => new RegExp(String.raw`(?<![\d.])${escaped(String(value))}(?:\.0+)?\s*${escaped(unit)}\b`, 'i');
