import Link from 'next/link';
import { useId, type ReactNode } from 'react';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { NumberCell, PrintedNumber } from '../../math/number-cell';
import { formatSetting, settingLabel } from '../setting-names';

type Candidate = ResultClaim['candidates'][number];

interface CandidateCardProps {
  readonly claim: ResultClaim;
  readonly candidate: Candidate;
  /** `Candidate 1 of 2`. */
  readonly place: string;
  /** The authors' answer, or the form for it; a try as a variation. */
  readonly below?: ReactNode;
}

/** Digits of the claimed number and one more: what decides whether it would agree. */
function significantOf({ printed }: ResultPoint): number {
  const digits = printed.replace(/[([{eE±].*$/, '').replace(/[^\d]/g, '').replace(/^0+/, '');
  return Math.min(12, Math.max(3, digits.length + 1));
}

/** The last place that is printed of a number with so many digits. */
const lastPlace = (value: number, significant: number): number => 10 ** (Math.floor(Math.log10(Math.abs(value))) - significant + 1);

/** U is that of the recomputed number: a reading is computed by route A alone. */
function UncertaintyBeside({ point, value, unit }: { readonly point: ResultPoint; readonly value: number; readonly unit: string }) {
  const u = point.expandedUncertainty;
  if (u === null) return <><i>U</i> unknown</>;
  if (value !== 0 && u < 0.5 * lastPlace(value, significantOf(point))) return <><i>U</i> below these digits</>;
  return <>± <NumberCell value={u} significant={2} unit={unit} /></>;
}

const pointWords = ({ at }: ResultPoint): string => Object.entries(at).map(([name, value]) => `${settingLabel(name)} ${formatSetting(name, value)}`).join(', ');

/** The number at each point under the reading, beside what was claimed there. */
function Values({ claim, candidate }: Pick<CandidateCardProps, 'claim' | 'candidate'>) {
  const rows = claim.points.flatMap((point, i) => (candidate.values[i] === null || candidate.values[i] === undefined ? [] : [{ point, value: candidate.values[i] }]));
  return (
    <dl className="mb-1 mt-3 grid gap-x-10 gap-y-2 text-ui [grid-template-columns:repeat(auto-fill,minmax(130px,max-content))]">
      {rows.map(({ point, value }, i) => (
        <div key={i}>
          <dt className="text-ink-2">{pointWords(point) || 'The number'}</dt>
          <dd className="text-[18px]/[24px] font-semibold tabular-nums"><NumberCell value={value} significant={significantOf(point)} unit={claim.unit} /></dd>
          <dd className="text-small text-ink-2"><UncertaintyBeside point={point} value={value} unit={claim.unit} /></dd>
          <dd className="text-small text-ink-2">claimed <PrintedNumber printed={point.printed} unit={claim.unit} /></dd>
        </div>
      ))}
    </dl>
  );
}

const conventionsOf = (readings: Candidate['readings']): string[] => [...new Set(readings.flatMap(({ conventions }) => conventions))];

function Conventions({ readings }: { readonly readings: Candidate['readings'] }) {
  return (
    <p className="text-small text-ink-2">
      What else is meant by it: {conventionsOf(readings).map((id, i) => <span key={id}>{i > 0 && ', '}<Link href={`/methods/conventions#${id}`} className="inline-flex min-h-8 items-center">{id}</Link></span>)}
    </p>
  );
}

/** A reading under which the claim would agree: page ground and a plain frame, since it is a hint to people and no verdict. */
export function CandidateCard({ claim, candidate, place, below }: CandidateCardProps) {
  const heading = useId();
  const [first, ...others] = candidate.readings;
  return (
    <div className="rounded border border-control bg-page px-[18px] pb-4 pt-3.5" role="group" aria-labelledby={heading}>
      <h4 id={heading} className="text-ui font-semibold text-ink-2">{place}, for people to judge</h4>
      <p className="max-w-[44ch] font-serif text-[18px]/[26px] font-semibold">Would agree if {first?.clause ?? ''}</p>
      {others.length > 0 && (
        <div className="mt-2 text-ui">
          <p>The same numbers come about otherwise too, and the numbers alone cannot tell which:</p>
          <ul className="list-disc pl-5">{others.map(({ clause }) => <li key={clause}>if {clause}</li>)}</ul>
        </div>
      )}
      <Values claim={claim} candidate={candidate} />
      <p className="mt-2 max-w-[66ch] text-ui">{candidate.sentence}</p>
      <Conventions readings={candidate.readings} />
      {below && <div className="mt-3 grid gap-2 border-t border-hair-2 pt-2">{below}</div>}
    </div>
  );
}
