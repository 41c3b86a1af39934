import { GLYPHS, SPACE_ADVANCE } from './glyphs';
import type { RecordStanding } from './standing';
import type { SubmissionWord } from './submission-word';

/** What a badge prints. Text is drawn as outlines, each letter defined once, so that the picture looks the same wherever it is embedded. */
export interface BadgeFacts {
  readonly recordId: string;
  readonly revision: number;
  readonly standing: RecordStanding;
  readonly word: SubmissionWord;
  readonly level: number;
  /** UTC day of entry, or of the standing where that is not `entered`. */
  readonly on: string;
}

const HEIGHT = 184;
const STROKE = 10;
const BASELINE = 126;
const MARGIN = 43;
const NOTCH = 23;
const OFFSET = 15;

const INK = { agrees: '#17708A', claimed: '#1F4E79', grey: '#4B5563', recheck: '#2B4C9B', paper: '#fff', tint: '#F2F9FA' } as const;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** `28 Nov 2026`. */
export function formatDay(day: string): string {
  const [year, month, date] = day.split('-').map(Number);
  return `${date} ${MONTHS[(month ?? 1) - 1]} ${year}`;
}

const STANDING_TEXT: Readonly<Record<Exclude<RecordStanding, 'entered'>, string>> = {
  'under-recheck': 'under recheck',
  superseded: 'superseded',
  lapsed: 'lapsed',
  struck: 'struck',
};
const WORD_TEXT: Readonly<Record<SubmissionWord, string>> = {
  'all agree': 'all claims agree',
  'some agree': 'some claims agree',
  'none agrees': 'no claim agrees',
  unsettled: 'unsettled',
};

/** The words of the right half, and of the title that a screen reader hears. */
export const badgeText = (facts: BadgeFacts): string =>
  facts.standing === 'entered' ? `${WORD_TEXT[facts.word]} · level ${facts.level}` : STANDING_TEXT[facts.standing];

export function badgeDescription(facts: BadgeFacts): string {
  const head = `Record ${facts.recordId}, revision ${facts.revision}`;
  const day = formatDay(facts.on);
  if (facts.standing === 'entered') return `${head}, entered ${day}. Live state: the record page.`;
  return `${head}, ${STANDING_TEXT[facts.standing]} since ${day}. The record page gives the reason.`;
}

interface Look {
  readonly left: { readonly fill: string; readonly ink: string; readonly outlined: boolean };
  readonly right: { readonly fill: string; readonly ink: string; readonly dashed: boolean };
  readonly notches: number;
  /** Halves that do not meet sit offset. */
  readonly offset: number;
}

function lookOf({ standing, word, level }: BadgeFacts): Look {
  const filled = (fill: string) => ({ fill, ink: INK.paper, outlined: false });
  const notches = Math.min(3, Math.max(1, level));
  if (standing === 'struck') return { left: { fill: INK.paper, ink: INK.grey, outlined: true }, right: { fill: INK.paper, ink: INK.grey, dashed: true }, notches: 1, offset: OFFSET };
  if (standing === 'under-recheck') return { left: filled(INK.claimed), right: { fill: INK.paper, ink: INK.recheck, dashed: true }, notches, offset: 0 };
  if (standing !== 'entered') return { left: filled(INK.grey), right: { fill: INK.paper, ink: INK.grey, dashed: false }, notches, offset: 0 };
  const meets = word === 'all agree';
  return { left: filled(INK.claimed), right: { fill: meets ? INK.tint : INK.paper, ink: INK.agrees, dashed: false }, notches, offset: meets ? 0 : OFFSET };
}

/** The edge on which the halves meet: as many teeth as the level, from `top` down (or up, for the other half). */
function teeth(height: number, count: number, down: boolean): string {
  const gap = (height - 2 * NOTCH * count) / (count + 1);
  const tooth = down ? `l${NOTCH} ${NOTCH}l-${NOTCH} ${NOTCH}` : `l${NOTCH}-${NOTCH}l-${NOTCH}-${NOTCH}`;
  const step = Math.round(gap);
  return `v${down ? step : -step}${tooth}`.repeat(count);
}

const advanceOf = (letter: string): number => (letter === ' ' ? SPACE_ADVANCE : (GLYPHS[letter]?.[0] ?? 0));
const widthOf = (text: string): number => [...text].reduce((sum, letter) => sum + advanceOf(letter), 0);

/** One letter each; T and D are the title's and the description's. */
const IDS = 'abcdefghijklmnopqrstuvwxyzABCEFGHIJKLMNOPQRSUVWXYZ';

class Letters {
  private readonly ids = new Map<string, string>();

  draw(text: string, x: number, y: number, ink: string): string {
    let at = x;
    const uses = [...text].map((letter) => {
      const use = letter === ' ' ? '' : `<use href="#${this.idOf(letter)}" x="${at}"/>`;
      at += advanceOf(letter);
      return use;
    });
    return `<g fill="${ink}" transform="translate(0 ${y})">${uses.join('')}</g>`;
  }

  definitions(): string {
    return `<defs>${[...this.ids].map(([letter, id]) => `<path id="${id}" d="${GLYPHS[letter]?.[1]}"/>`).join('')}</defs>`;
  }

  private idOf(letter: string): string {
    if (!GLYPHS[letter]) throw new Error(`the badge has no outline for “${letter}”`);
    const known = this.ids.get(letter);
    if (known) return known;
    const id = IDS[this.ids.size] ?? `a${this.ids.size}`;
    this.ids.set(letter, id);
    return id;
  }
}

/** The badge as SVG: under 6 KB, no script, no link, no outside reference. */
export function drawBadge(facts: BadgeFacts): string {
  const look = lookOf(facts);
  const text = `${badgeText(facts)} · ${formatDay(facts.on)}`;
  const h = HEIGHT - look.offset;
  const edge = MARGIN + widthOf('Counterfoil') + 28;
  const right = edge + NOTCH + STROKE + 33 + widthOf(text) + MARGIN;
  const half = STROKE / 2;
  const rise = Math.round(h / 2);
  const letters = new Letters();
  const words =
    letters.draw('Counterfoil', MARGIN, BASELINE - Math.round(look.offset / 2), look.left.ink) +
    letters.draw(text, edge + NOTCH + STROKE + 33, BASELINE + Math.round(look.offset / 2), look.right.ink);
  const inset = look.left.outlined ? half : 0;
  const leftPath = `M${inset} ${inset}H${edge}${teeth(h - 2 * inset, look.notches, true)}V${h - inset}H${inset}z`;
  const gutter = edge + STROKE + half;
  const rightPath = `M${gutter} ${look.offset + half}${teeth(h - 2 * half, look.notches, true)}V${HEIGHT - half}H${right - half}V${look.offset + half}z`;
  const leftStroke = look.left.outlined ? ` stroke="${look.left.ink}" stroke-width="${STROKE}"` : '';
  const dash = look.right.dashed ? ` stroke-dasharray="${Math.round(rise / 3)} 18"` : '';
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${right} ${HEIGHT}" role="img" aria-labelledby="T D">` +
    `<title id="T">Counterfoil: ${badgeText(facts)}</title><desc id="D">${badgeDescription(facts)}</desc>` +
    `<path fill="${look.right.fill}" stroke="${look.right.ink}" stroke-width="${STROKE}"${dash} d="${rightPath}"/>` +
    `<path fill="${look.left.fill}"${leftStroke} d="${leftPath}"/>` +
    `${letters.definitions()}${words}</svg>`
  );
}
