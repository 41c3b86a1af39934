/** What the head of a file says of the bodies, in the words that are usual there. */
export interface Stated {
  readonly value: number;
  readonly line: number;
}

const number = String.raw`([+-]?\d+(?:\.\d*)?(?:[eEdD][+-]?\d+)?|[+-]?\.\d+(?:[eEdD][+-]?\d+)?)`;
const field = (names: string): RegExp => new RegExp(String.raw`(?:^|[\s,;({"'])(?:${names})["']?\s*[:=]\s*${number}(?![\w.])`, 'i');

const fields = {
  mass1: field('mass[-_ ]?1|m_?1|initial[-_ ]mass[-_ ]?1'),
  mass2: field('mass[-_ ]?2|m_?2|initial[-_ ]mass[-_ ]?2'),
  ratio: field('mass[-_ ]ratio|q'),
  spin1: field('(?:spin|chi)[-_ ]?1_?z|(?:spin|chi)z[-_ ]?1'),
  spin2: field('(?:spin|chi)[-_ ]?2_?z|(?:spin|chi)z[-_ ]?2'),
  effectiveSpin: field('chi[-_ ]?eff|effective[-_ ]spin'),
} as const;
export type StatedName = keyof typeof fields;

/** The first that says it. */
export function stated(comments: readonly { readonly line?: number; readonly text: string }[], name: StatedName): Stated | null {
  for (const { line = 0, text } of comments) {
    const found = fields[name].exec(text)?.[1];
    if (found !== undefined) return { value: Number(found.replace(/[dD]/, 'e')), line };
  }
  return null;
}

/** V22 asks when the masses differ from their total by more. */
const APART = 1e-3;
/** Printed mass ratios are rounded. */
export const RATIO_APART = 5e-3;
/** Sums above this are not meant in units of the total mass. */
const IN_TOTAL_MASS = 2;

export const apart = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

export interface MassSum {
  readonly sum: number;
  readonly total: number;
  readonly unit: 'M' | 'M☉';
  /** Which mass the sum looks like, if one. */
  readonly looksLike: string | null;
}

/** Masses that do not add up to the total, and what they then may be; null where they do, or where no total is known. */
export function massSum(m1: number, m2: number, totalMassMsun: number | null, { remnantMass, admEnergy }: { readonly remnantMass?: number; readonly admEnergy?: number }): MassSum | null {
  const sum = m1 + m2;
  const total = sum > IN_TOTAL_MASS ? totalMassMsun : 1;
  if (total === null || !(sum > 0) || apart(sum, total) <= APART) return null;
  const is = [
    [remnantMass, 'the remnant mass'],
    [admEnergy, 'the ADM energy'],
  ] as const;
  const named = is.find(([mass]) => mass !== undefined && apart(sum, mass) < APART)?.[1];
  return { sum, total, unit: total === 1 ? 'M' : 'M☉', looksLike: named ?? (sum < 0.975 && sum > 0.85 ? 'a remnant mass' : sum < 1 && sum > 0.975 ? 'an ADM energy' : null) };
}
