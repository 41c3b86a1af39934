import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { formatNumber } from '../../math/format-number';
import { formatWithUncertainty } from '../../math/format-uncertainty';
import { unitText } from '../../math/units';
import { remarkWord } from '../../verdict/verdict-chip';
import { verdictLooks } from '../../verdict/verdict-words';
import type { ClaimHeading, NoiseSource } from '../record-view';
import { formatAt } from '../setting-names';
import { shortDigest, sourceWords, type PrintSource } from './print-source';
import { settingClauses } from './setting-clauses';

export interface Printable {
  readonly heading: ClaimHeading;
  readonly claim: ResultClaim;
  readonly point: ResultPoint;
  readonly source: PrintSource;
}

const lowered = (title: string): string => (/^[A-Z][a-z]/.test(title) ? title.charAt(0).toLowerCase() + title.slice(1) : title);

/** What computed it: two routes only where both gave a number here. */
function routesText({ routes, verdict }: ResultPoint): string {
  if (verdict === 'routes-disagree') return 'by two routes, which disagree';
  return routes.A !== null && routes.B !== null ? 'by two routes' : 'by route A alone at this point';
}

/** `0.0399 with tolerance 0.00025`; a bound has none, a fraction is told in per cent. */
export function claimedText({ heading, point }: Printable): string {
  const printed = `${point.printed} ${unitText(heading.unit)}`.trim();
  if (point.tolerance === null) return /^[<>≤≥]/.test(point.printed) ? printed : `${printed} with tolerance unknown`;
  const tolerance = heading.scale === 'ln' ? `${formatNumber(Math.expm1(point.tolerance) * 100, { significant: 2 })} %` : `${formatNumber(Number(point.tolerance.toPrecision(3)))} ${unitText(heading.unit)}`.trim();
  return `${printed} with tolerance ${tolerance}`;
}

/** Value and U in the claim's unit, two digits of U. */
export const valueText = ({ claim, point }: Printable): string => formatWithUncertainty(point.value, point.expandedUncertainty, claim.unit);

/** Names of the sheet are only names: the files they stand for go with them. */
function dataText({ heading, source }: Printable): readonly string[] {
  if (!heading.waveforms) return ['waveforms as named in the claim sheet'];
  return heading.waveforms.map(({ name, files }) => {
    if (files.length === 0) return `${name} from a file that is unknown here`;
    return files.length > 2 ? `${name} from ${files.length} files` : `${name} from ${files.map((file) => `${file} (${shortDigest(source.files, file)})`).join(' and ')}`;
  });
}

export function noiseText(noise: NoiseSource | null | undefined, files: PrintSource['files']): string | null {
  if (noise === null) return null;
  if (noise === undefined) return 'noise curve unknown here: the claim sheet names it';
  return noise.kind === 'built-in' ? `noise curve ${noise.id}, ${lowered(noise.title)} (${noise.source})` : `noise curve ${noise.name} from ${noise.file} (${shortDigest(files, noise.file)})`;
}

export const clausesOf = ({ heading, claim, point }: Printable) =>
  settingClauses(claim, point, heading.noiseSource !== null, heading.noiseSource?.kind === 'built-in' ? heading.noiseSource.fHighHz : null);

const stops = (claim: ResultClaim): string => [...new Set(claim.findings.filter((finding) => finding.level === 'stops-lodging').map((finding) => finding.code))].join(', ');

function outcomeText(printable: Printable): string {
  const { claim, point, source } = printable;
  const engine = source.engine ? `, engine ${source.engine},` : '';
  if (point.value === null) return `could not be recomputed by Counterfoil${engine} from the authors’ files (${stops(claim) || 'no reason is recorded'})`;
  return `is ${valueText(printable)} (k = 2, of the computation alone), recomputed by Counterfoil${engine} from the authors’ files ${routesText(point)}`;
}

/**
 * One number, ready for a paper: value ± U and every setting that it rests on, declared or assumed.
 * What is not known is said to be unknown.
 */
export function printedSentence(printable: Printable): string {
  const { heading, claim, point, source } = printable;
  const place = formatAt(point.at);
  const words = claim.remarks.map((remark) => remarkWord(remark).split(':')[0] ?? remark);
  const remarks = words.length > 0 ? `, with the ${words.length === 1 ? 'remark' : 'remarks'} ${words.join(', ')}` : '';
  const verdict = `claimed: ${claimedText(printable)}; verdict: ${verdictLooks[point.verdict].word.toLowerCase()}${remarks}`;
  const noise = noiseText(heading.noiseSource, source.files);
  const settings = claim.settings.length === 0 ? ['settings unknown: the run stopped before any was used'] : clausesOf(printable).map((clause) => clause.text);
  const parts = [...dataText(printable), ...(noise ? [noise] : []), ...settings, sourceWords(source)];
  return `The ${lowered(heading.title)}${place ? ` at ${place}` : ''} ${outcomeText(printable)} (${verdict}); ${parts.join('; ')}.`;
}
