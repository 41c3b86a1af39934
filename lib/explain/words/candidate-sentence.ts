import type { Candidate } from '../candidate';
import type { JudgedClaim, JudgedPoint } from '../search/node';
import { capital, claimedNumber, countWord, listOf, measuredNumber, percentage } from './numbers';
import { atPlace } from './places';

type Facts = Omit<Candidate, 'sentence'>;

/** What a reading would mean, for people: a condition, never what somebody did. */
export function candidateSentence(claim: JudgedClaim, facts: Facts): string {
  const i = furthest(claim);
  const parts = [declaredPart(claim, i), obtainedPart(claim, i, facts), cannotTell(facts), evidencePart(facts), othersPart(facts), chancePart(facts), 'This is a suggestion for the author, not a finding.'];
  return parts.filter((part) => part !== '').join(' ');
}

/** Index of the point that is furthest from the claim as declared: the one that says most. */
function furthest({ points, scale }: JudgedClaim): number {
  const off = ({ claimed, value, tolerance, expandedUncertainty }: JudgedPoint): number =>
    scale === 'ln' ? Math.abs(Math.log(claimed / value)) / (tolerance + Math.abs(expandedUncertainty / value)) : Math.abs(claimed - value) / (tolerance + expandedUncertainty);
  return points.reduce((most, point, i) => (off(point) > off(points[most]!) ? i : most), 0);
}

function declaredPart({ points, unit }: JudgedClaim, i: number): string {
  const { value, expandedUncertainty, at } = points[i]!;
  return `With the stated settings we obtain ${measuredNumber(value, expandedUncertainty, unit)}${points.length > 1 ? atPlace(at) : ''}.`;
}

function obtainedPart({ points, unit, law }: JudgedClaim, i: number, { readings, values }: Facts): string {
  const { claimed, halfDigit, expandedUncertainty, value: declared } = points[i]!;
  const value = values[i] ?? null;
  // What a factor makes of a number it makes of its error bar.
  const width = value === null || law !== 'size' || declared === 0 ? expandedUncertainty : expandedUncertainty * Math.abs(value / declared);
  const all = points.length === 1 ? 'is obtained' : points.length === 2 ? 'is obtained, and the other number too,' : `is obtained, and the other ${countWord(points.length - 1)} numbers too,`;
  return `The claimed ${claimedNumber(claimed, halfDigit, unit)} ${all} if ${conditions(readings)}${value === null ? '' : `: ${measuredNumber(value, width, unit)}`}.`;
}

const MOST_READINGS = 3;

function conditions(readings: Facts['readings']): string {
  const clauses = [...new Set(readings.map(({ clause }) => clause))];
  const shown = clauses.slice(0, MOST_READINGS);
  const left = clauses.length - shown.length;
  return listOf(left === 0 ? shown : [...shown, `by ${countWord(left)} other reading${left === 1 ? '' : 's'}`], 'or if').replace('or if by', 'or by');
}

const cannotTell = ({ readings }: Facts): string => (readings.length > 1 ? 'The number alone cannot tell which.' : '');

function evidencePart({ readings }: Facts): string {
  const from = (evidence: 'supports' | 'contradicts'): string[] => [...new Set(readings.flatMap((one) => (one.evidence === evidence && one.evidenceFrom !== null ? [one.evidenceFrom] : [])))];
  const [speaksFor, speaksAgainst] = [from('supports'), from('contradicts')];
  return [spoken('for', speaksFor), spoken('against', speaksAgainst)].filter((part) => part !== '').join(' ');
}

/** What data show is a sentence of its own; what somebody wrote is quoted. */
function spoken(side: 'for' | 'against', from: readonly string[]): string {
  const data = from.filter((words) => words.endsWith('.'));
  const quotes = from.filter((words) => !words.endsWith('.'));
  const said = quotes.length > 0 ? `${capital(side)} it speak${quotes.length === 1 ? 's' : ''} ${listOf(quotes)}.` : '';
  return [data.length > 0 ? `The data speak ${side} it: ${data.join(' ')}` : '', said].filter((part) => part !== '').join(' ');
}

function othersPart({ explains, breaks }: Facts): string {
  const agree = explains.length > 0 ? `${listOf(explains)} would agree under it too.` : '';
  const lose = breaks.length > 0 ? `${listOf(breaks)}, which ${breaks.length === 1 ? 'agrees' : 'agree'} as declared, would not agree under it.` : '';
  return [agree, lose].filter((part) => part !== '').join(' ');
}

function chancePart({ readings, tried, chance, standing, changes }: Facts): string {
  const one = readings.length === 1 ? 'One reading' : `${capital(countWord(readings.length))} readings`;
  const often = `a fit as good would arise by chance in ${percentage(chance)} of claims`;
  // The search as a whole tried more than a single change is judged among.
  const among = changes === 1 ? `${tried} single ones tried` : `${tried} tried, single ones and pairs`;
  return `${one} of ${among}; ${often}${standing === 'coincidence' ? ', and this one may be a coincidence' : ''}.`;
}
