import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { formatAt, settingLabel } from '../../claim/setting-names';
import { unitText } from '../../math/units';

/** What the page knows about a figure and the figure does not. */
export interface FigureOrigin {
  /** `Counterfoil record 90tf-w8a1, revision 2, https://…`. */
  readonly source: string;
  /** Begins the name of every file saved: `counterfoil-90tf-w8a1-r2`. */
  readonly stem: string;
  readonly claimId: string;
  /** `Match of A and B`. */
  readonly quantity: string;
  /** Of a claim with one value, where it stands; figures of a sweep say it themselves. */
  readonly place: string | null;
}

export const withUnit = (label: string, unit: string): string => (unitText(unit) ? `${label} [${unitText(unit)}]` : label);

const lowered = (label: string): string => (/^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label);

export const xLabel = ({ kind, x }: Figure): string => withUnit(kind === 'sweep' ? settingLabel(x.label) : x.label, x.unit);

export const titleOf = (figure: Figure, origin: FigureOrigin): string =>
  figure.kind === 'sweep' ? `${origin.quantity} over ${lowered(settingLabel(figure.x.label))}` : figure.title;

const theOnly = (names: readonly (string | undefined)[]): string | null => (new Set(names).size === 1 ? (names[0] ?? null) : null);

/** Labels such as `A: dρ²/d ln f` name one quantity for several traces. */
const shared = (labels: readonly string[]): string | null => {
  const ends = new Set(labels.map((label) => label.split(': ')[1] ?? ''));
  const [end = ''] = ends;
  return ends.size === 1 && end !== '' ? end : null;
};

/** What the vertical axis is of: the quantity that its traces state, one trace's own name, what several share, or the claim's quantity. */
export function yLabel(figure: Figure, lines: readonly FigureSeries[], origin: FigureOrigin): string {
  const unit = lines[0]?.unit ?? '';
  const stated = theOnly(lines.map((line) => line.quantity));
  if (stated !== null) return withUnit(stated, unit);
  if (figure.kind === 'sweep') return withUnit(origin.quantity, unit);
  if (unit === 'strain') return lines.length === 1 && lines[0] ? `${lines[0].label}, strain` : 'strain';
  const name = lines.length === 1 ? (lines[0]?.label ?? '') : (shared(lines.map((line) => line.label)) ?? 'value');
  return withUnit(name, unit);
}

/** Which point of the claim is drawn; a figure over the whole sweep is of all of them. */
export function pointWords(figure: Figure, origin: FigureOrigin): string {
  if (figure.kind === 'sweep') return `all ${figure.x.values.length} points`;
  if (figure.at && Object.keys(figure.at).length > 0) return `at ${formatAt(figure.at)}`;
  return origin.place ? `at ${origin.place}` : figure.at ? 'its only point' : 'the point furthest from its claim';
}

const slug = (text: string): string => text.normalize('NFKD').replace(/[^A-Za-z0-9.]+/g, '-').replace(/^[-.]+|[-.]+$/g, '').slice(0, 60);

/** `counterfoil-90tf-w8a1-r2-C1-integrand.svg`. */
export const fileNameOf = (figure: Figure, origin: FigureOrigin, ending: 'svg' | 'png' | 'csv'): string =>
  `${[origin.stem, origin.claimId, figure.kind].map(slug).join('-')}.${ending}`;
