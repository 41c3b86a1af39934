import { toneText } from './verdict-chip';
import { verdictLooks, type VerdictState } from './verdict-words';

export interface GapDrawing {
  /** Half the band of ±T, and where the recomputed value stands, in pixels from the left. */
  readonly bandHalf: number;
  readonly centre: number;
  readonly at: number;
  readonly whisker: number;
  /** Beyond the gauge: an arrow in this direction instead of a dot. */
  readonly beyond: -1 | 0 | 1;
}

const width = 112;
const reach = 46;
/** The gauge shows three tolerances to each side. */
const span = 3;

/** Where the marks stand; null when there is no tolerance to measure by (bounds, missing values). */
export function drawGap(apart: number | null, tolerance: number | null, uncertainty: number | null): GapDrawing | null {
  if (apart === null || tolerance === null || !Number.isFinite(apart) || !(tolerance > 0)) return null;
  const inTolerances = apart / tolerance;
  const centre = width / 2;
  const perTolerance = reach / span;
  const beyond = inTolerances < -span ? -1 : inTolerances > span ? 1 : 0;
  const clamped = Math.max(-span, Math.min(span, inTolerances));
  const whisker = uncertainty !== null && Number.isFinite(uncertainty) ? Math.min(2 * reach, (uncertainty / tolerance) * perTolerance) : 0;
  return { bandHalf: perTolerance, centre, at: centre + clamped * perTolerance, whisker: Math.max(1.2, whisker), beyond };
}

interface GapGaugeProps {
  readonly apart: number | null;
  readonly tolerance: number | null;
  readonly uncertainty: number | null;
  readonly state: VerdictState;
}

/** Hidden from screen readers: the row says the same in numbers. */
export function GapGauge({ apart, tolerance, uncertainty, state }: GapGaugeProps) {
  const gap = drawGap(apart, tolerance, uncertainty);
  if (!gap) return null;
  const low = gap.at - gap.whisker;
  const high = gap.at + gap.whisker;
  return (
    <svg className={`gauge ${toneText[verdictLooks[state].tone]}`} viewBox={`0 0 ${width} 24`} aria-hidden="true" focusable="false">
      <line className="axis" x1="2" x2="110" y1="12.5" y2="12.5" />
      <rect className="t" x={gap.centre - gap.bandHalf} y="5" width={2 * gap.bandHalf} height="15" />
      <line className="cl" x1={gap.centre} x2={gap.centre} y1="3" y2="22" />
      {gap.beyond < 0 && <path className="u" d="M16 12.5H4M9 7.5l-5 5l5 5" />}
      {gap.beyond > 0 && <path className="u" d="M96 12.5h12M103 7.5l5 5l-5 5" />}
      {gap.beyond === 0 && (
        <>
          <path className="u" d={`M${low} 12.5H${high}M${low} 9.500v6M${high} 9.500v6`} />
          <circle className="d" cx={gap.at} cy="12.5" r="3" />
        </>
      )}
    </svg>
  );
}
