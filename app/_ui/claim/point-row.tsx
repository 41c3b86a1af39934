import type { ReactNode } from 'react';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { decimalsForReading, printedDecimals, roundUpUncertainty } from '../math/format-uncertainty';
import { numberParts } from '../math/format-number';
import { NumberCell, PrintedNumber, SetNumber, Unknown } from '../math/number-cell';
import { UnitLabel } from '../math/unit-label';
import { Skeleton } from '../primitives/page-state';
import { GapGauge } from '../verdict/gap-gauge';
import { Remark, VerdictChip } from '../verdict/verdict-chip';
import { PerfCell } from './claim-table';
import type { ClaimedPoint, ClaimHeading, RecordSlots } from './record-view';

export interface PointOnScreen {
  readonly index: number;
  readonly claimed: ClaimedPoint;
  readonly result: ResultPoint | null;
  readonly place: string | null;
}

interface PointCellsProps {
  readonly heading: ClaimHeading;
  readonly claim: ResultClaim | null;
  readonly point: PointOnScreen;
  readonly sweep: boolean;
  readonly first: boolean;
  /** What stands in the verdict's place while there is no result. */
  readonly waiting: string | null;
  readonly slots: RecordSlots;
  /** Buttons that copy this number. */
  readonly copy: ReactNode;
}

/** The number in what the author printed: `36.3(2)`, `> 0.999`, `0.5 ± 0.1`. */
const toNumber = (printed: string): number => Number((/[-+−]?(?:\d[\d,]*\.?\d*|\.\d+)/.exec(printed)?.[0] ?? '').replace('−', '-').replaceAll(',', '') + (/[eE][-+]?\d+/.exec(printed)?.[0] ?? ''));

/** Beyond these decimals a plain number is harder to read than its power of ten. */
const mostColumnDecimals = 8;

/** Tolerance and distance in the quantity's own unit, also where they are declared as fractions. */
function inUnit(point: PointOnScreen, ln: boolean): { readonly tolerance: number | null; readonly apart: number | null } {
  const { tolerance } = point.claimed;
  const value = point.result?.value ?? toNumber(point.claimed.printed);
  const apart = point.result?.apart ?? null;
  return ln ? { tolerance: tolerance === null ? null : tolerance * Math.abs(value), apart: apart === null ? null : apart * Math.abs(value) } : { tolerance, apart };
}

interface ReadingStyle {
  readonly decimals: number;
  readonly plain: boolean;
}

function readingStyle(point: PointOnScreen, ln: boolean): ReadingStyle {
  const { tolerance, apart } = inUnit(point, ln);
  const decimals = decimalsForReading(tolerance, printedDecimals(point.claimed.printed), point.result?.expandedUncertainty ?? null, apart);
  const size = Math.abs(point.result?.value ?? toNumber(point.claimed.printed));
  return { decimals, plain: size === 0 || (size >= 1e-3 && decimals <= mostColumnDecimals) };
}

/** Cells of one point after the claim's name: where, claimed, tolerance | value, U, apart, verdict. */
export function PointCells({ heading, claim, point, sweep, first, waiting, slots, copy }: PointCellsProps) {
  const { claimed, result } = point;
  const u = result?.expandedUncertainty ?? null;
  const style = readingStyle(point, heading.scale === 'ln');
  const At = sweep ? 'th' : 'td';
  return (
    <>
      <At className={`c n lo${point.place ? '' : ' none'}`} data-l="At" role={sweep ? 'rowheader' : 'cell'} scope={sweep ? 'row' : undefined}>
        {point.place ? <Place text={point.place} /> : <span aria-label="no place: a single value">–</span>}
      </At>
      <td className="c n" role="cell" data-l="Claimed"><PrintedNumber printed={claimed.printed} unit={heading.unit} /></td>
      <td className="c n lo" role="cell" data-l="Tolerance"><Tolerance claimed={claimed} ln={heading.scale === 'ln'} plain={style.plain} unit={heading.unit} /></td>
      <PerfCell />
      <td className="r n" role="cell" data-l="Recomputed">
        <Recomputed point={point} unit={heading.unit} style={style} waiting={waiting} />
        {result && slots.anchor?.(heading.id, point.index)}
        {copy}
      </td>
      <td className="r n lo" role="cell" data-l="U (k = 2)">{result && result.value !== null ? <Uncertainty u={u} unit={heading.unit} /> : <NoNumber />}</td>
      <td className="r n lo" role="cell" data-l="Apart by"><Apart heading={heading} point={point} style={style} /></td>
      <td className="r vcell" role="cell" data-l="Verdict">
        {result ? <VerdictChip state={result.verdict} /> : <VerdictChip state="waiting">{waiting}</VerdictChip>}
        {result?.because && <p className="max-w-[40ch] whitespace-normal text-small text-ink-2">{result.because}</p>}
        {first && claim?.remarks.map((remark) => <Remark key={remark} remark={remark} />)}
        {slots.change?.(heading.id, point.index)}
      </td>
    </>
  );
}

const NoNumber = () => <span><span className="i" aria-hidden>—</span><span className="sr-only">none</span></span>;

/** `60 M⊙`: digits first, so that a column of masses lines up. */
function Place({ text }: { readonly text: string }) {
  const [, digits, rest] = /^(−?[\d,.]+)(.*)$/.exec(text) ?? [];
  if (digits === undefined) return <span className="whitespace-normal">{text}</span>;
  const unit = (rest ?? '').trim();
  return (
    <span className="whitespace-nowrap">
      <span className="i">{digits}</span>{' '}
      {unit === 'M⊙' ? <UnitLabel unit="Msun" /> : unit}
    </span>
  );
}

function Tolerance({ claimed, ln, plain, unit }: { readonly claimed: ClaimedPoint; readonly ln: boolean; readonly plain: boolean; readonly unit: string }) {
  if (/^[<>≤≥]/.test(claimed.printed)) return <span className="whitespace-normal">a bound has none</span>;
  if (claimed.tolerance === null) return <span className="whitespace-normal">natural</span>;
  if (ln) return <NumberCell value={Math.expm1(claimed.tolerance) * 100} significant={2} unit="%" />;
  // Three digits: the rest of a natural tolerance is arithmetic, not a promise.
  return <NumberCell value={Number(claimed.tolerance.toPrecision(3))} plain={plain && claimed.tolerance >= 1e-6} unit={unit} />;
}

function Recomputed({ point, unit, style, waiting }: { readonly point: PointOnScreen; readonly unit: string; readonly style: ReadingStyle; readonly waiting: string | null }) {
  if (!point.result) return waiting === 'Not run yet' ? <NoNumber /> : <><Skeleton width="7ch" /><span className="sr-only">not computed yet</span></>;
  return <NumberCell value={point.result.value} decimals={style.decimals} plain={style.plain} unit={unit} unknown="not computable" />;
}

function Uncertainty({ u, unit }: { readonly u: number | null; readonly unit: string }) {
  if (u === null) return <Unknown />;
  return <NumberCell value={roundUpUncertainty(u)} significant={2} unit={unit} />;
}

function Apart({ heading, point, style }: { readonly heading: ClaimHeading; readonly point: PointOnScreen; readonly style: ReadingStyle }) {
  const result = point.result;
  if (!result || result.apart === null) return <NoNumber />;
  const ln = heading.scale === 'ln';
  const parts = ln ? numberParts(Math.expm1(result.apart) * 100, { significant: 2, signed: true }) : numberParts(result.apart, { decimals: style.decimals, plain: style.plain, signed: true });
  return (
    <>
      <span className="ap">{parts ? <><SetNumber parts={parts} />{ln ? ' %' : null}</> : <Unknown />}</span>
      <GapGauge apart={result.apart} tolerance={result.tolerance} uncertainty={ln ? relative(result) : result.expandedUncertainty} state={result.verdict} />
    </>
  );
}

/** U on the ln scale. */
const relative = (result: ResultPoint): number | null => (result.value && result.expandedUncertainty !== null ? result.expandedUncertainty / Math.abs(result.value) : null);
