import type { Finding, FindingLevel } from '@/lib/engine/contract/finding';
import type { ResultClaim, ResultDocument, ResultPoint } from '@/lib/pipeline/result';
import { submissionVerdict, type VerdictWord } from '@/lib/verdicts/verdict';
import { brief, withUncertainty } from './print-numbers';

const verdictWords: Record<VerdictWord, string> = { agrees: 'agrees', differs: 'differs', unsettled: 'unsettled', 'not-computable': 'not computable', 'routes-disagree': 'routes disagree' };
const levelWords: Record<FindingLevel, string> = { 'stops-lodging': 'stops lodging', 'needs-answer': 'needs an answer', 'worth-a-look': 'worth a look', note: 'note' };
const summary = { 'all-agree': 'All claims agree.', 'some-agree': 'Some claims agree.', 'none-agrees': 'No claim agrees.', unsettled: 'Unsettled.' };

/** The result as a table for people. */
export function printResult(result: ResultDocument): string {
  const heading = `${result.title === '' ? 'Claim sheet' : result.title}  (engine ${result.engine})`;
  const closing = summary[submissionVerdict(result.claims.map((claim) => claim.verdict))];
  return `${[heading, ...result.claims.map(printClaim), ...guessLines(result), closing].join('\n\n')}\n`;
}

/** Only what speaks against the words beside a file; it moved no number. */
function guessLines({ guesses = [] }: ResultDocument): string[] {
  const against = guesses.filter(({ agrees, value }) => !agrees && value !== null);
  if (against.length === 0) return [];
  return [['What the files say against the words beside them; the numbers above take the words as they are:', ...against.map(({ field, standing, value, proposed, confidence, reason }) => `  ${field} (${standing}: ${value}): ${proposed}, confidence ${confidence}. ${reason}`)].join('\n')];
}

function printClaim(claim: ResultClaim): string {
  const unit = claim.unit === '' ? '' : ` in ${claim.unit}`;
  const swept = Object.keys(claim.points[0]?.at ?? {});
  const header = [...swept, 'claimed', `recomputed ± U${unit}`, 'T', 'verdict'];
  const lines = [
    `${claim.id}  ${claim.quantity}: ${verdictWords[claim.verdict]}`,
    ...columns([header, ...claim.points.map((point) => pointCells(point, swept))]).map((line) => `  ${line}`),
    ...claim.remarks.map((remark) => `  Remark: ${remark}`),
    `  Stated uncertainty: ${coverageWords(claim)}`,
    ...(claim.assumed.length > 0 ? [`  Assumed: ${assumedWords(claim)}`] : []),
    ...claim.findings.flatMap(findingLines),
    ...searchLines(claim),
  ];
  return lines.join('\n');
}

function pointCells(point: ResultPoint, swept: readonly string[]): string[] {
  return [...swept.map((name) => String(point.at[name])), point.printed, withUncertainty(point.value, point.expandedUncertainty), brief(point.tolerance), verdictWords[point.verdict]];
}

function columns(rows: readonly (readonly string[])[]): string[] {
  const widths = rows[0]?.map((_, k) => Math.max(...rows.map((row) => row[k]?.length ?? 0))) ?? [];
  return rows.map((row) => row.map((cell, k) => cell.padEnd(widths[k] ?? 0)).join('   ').trimEnd());
}

function coverageWords({ coverage }: ResultClaim): string {
  if (coverage.state === 'unknown') return `unknown (not available: ${coverage.missing?.join(', ') ?? 'the budget'})`;
  if (coverage.state === 'covered') return 'covered';
  const isLeast = coverage.missing !== undefined;
  const because = [...(coverage.factor === undefined ? [] : [`${isLeast ? 'at least ' : ''}×${coverage.factor}`]), ...(isLeast ? [`not available: ${coverage.missing.join(', ')}`] : [])];
  return because.length === 0 ? 'understated' : `understated (${because.join('; ')})`;
}

function assumedWords(claim: ResultClaim): string {
  const used = new Map(claim.settings.map((setting) => [setting.name, setting]));
  return claim.assumed
    .map((name) => {
      const setting = used.get(name);
      if (!setting || setting.value === undefined || setting.value === null) return name;
      return `${name} = ${valueWords(setting.value)}${setting.unit ? ` ${setting.unit}` : ''}`;
    })
    .join(', ');
}

/** A setting's value for reading: six digits, ranges over a sweep as ranges. */
function valueWords(value: unknown): string {
  if (typeof value === 'number') return String(Number(value.toPrecision(6)));
  if (Array.isArray(value)) return `[${value.map(valueWords).join(', ')}]`;
  if (typeof value !== 'object' || value === null) return String(value);
  const entries = Object.entries(value);
  if (entries.map(([name]) => name).join() === 'from,to') return entries.map(([, end]) => valueWords(end)).join(' to ');
  return entries.map(([name, part]) => `${name} ${valueWords(part)}`).join(' and ');
}

function findingLines(finding: Finding): string[] {
  const at = Object.entries(finding.at ?? {}).map(([name, value]) => `, at ${name} ${value}`).join('');
  const first = `  ${capital(levelWords[finding.level])}: ${finding.text} [${finding.code}, ${finding.where}${at}]`;
  return finding.fix === undefined ? [first] : [first, `    Next: ${finding.fix}`];
}

const capital = (word: string): string => word.charAt(0).toUpperCase() + word.slice(1);

/** What `--explain` adds: candidates first, then what may be coincidence, then how far the search got. */
function searchLines({ search, candidates }: ResultClaim): string[] {
  if (search === undefined) return [];
  const shown = candidates.filter(({ standing }) => standing === 'candidate');
  const others = candidates.filter(({ standing }) => standing === 'coincidence');
  return [
    ...shown.flatMap(({ readings, sentence }, i) => [`  Would agree if ${readings.map(({ clause }) => clause).join('; or if ')}. (candidate ${i + 1} of ${shown.length})`, `    ${sentence}`]),
    ...others.map(({ readings, chance }) => `  May be coincidence: ${readings.map(({ clause }) => clause).join('; or ')} (chance ${percent(chance)})`),
    `  Search: ${search.sentence}`,
    ...(search.extraNumber === null ? [] : [`  One number more: ${search.extraNumber.sentence}`]),
  ];
}

const percent = (share: number): string => (share < 0.001 ? 'under 0.1 %' : `${Number((100 * share).toPrecision(2))} %`);
