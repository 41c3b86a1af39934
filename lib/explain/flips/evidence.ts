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
}

const quoted = ({ where, text }: Written): string => `${where}: “${text.length > 80 ? `${text.slice(0, 79)}…` : text}”`;

const firstWith = (texts: readonly Written[], patterns: readonly RegExp[] = []): Written | undefined => texts.find(({ text }) => patterns.some((pattern) => pattern.test(text)));

/** Words on both sides settle nothing. */
export function evidenceIn(texts: readonly Written[], telling: Telling): Found {
  const speaksFor = firstWith(texts, telling.supports);
  const speaksAgainst = firstWith(texts, telling.contradicts);
  if (speaksFor !== undefined && speaksAgainst === undefined) return { evidence: 'supports', evidenceFrom: quoted(speaksFor) };
  if (speaksAgainst !== undefined && speaksFor === undefined) return { evidence: 'contradicts', evidenceFrom: quoted(speaksAgainst) };
  return { evidence: 'none', evidenceFrom: null };
}

const escaped = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, String.raw`\$&`);

/** A number followed by its unit, and no digit before it. */
export const measured = (value: number, unit: string): RegExp => new RegExp(String.raw`(?<![\d.])${escaped(String(value))}(?:\.0+)?\s*${escaped(unit)}\b`, 'i');
