import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';
import { formatNumber } from '../../math/format-number';
import { axisScale } from '../axis-scale';
import { axisTicks } from '../export/axis-ticks';
import { withUnit } from '../export/figure-words';
import { planeMarks, type PlaneFrame, type PlaneMarks } from './plane-marks';

const WIDTH = 372;
const HEIGHT = 344;
const frame: PlaneFrame = { left: 58, top: 8, width: 304, height: 284 };
const FOOT = frame.top + frame.height;

const ticksOf = (values: readonly number[]) => axisTicks(axisScale('linear', values), values[0] ?? 0, values.at(-1) ?? 1, 5);

function Axes({ figure, plane, marks }: { readonly figure: Figure; readonly plane: FigurePlane; readonly marks: PlaneMarks }) {
  return (
    <g fill="var(--ink-2)" fontSize="12" stroke="none">
      {ticksOf(figure.x.values).map(({ at, label }) => <g key={label}><path d={`M${marks.toX(at)} ${FOOT}v4`} stroke="var(--ink-2)" /><text x={marks.toX(at)} y={FOOT + 17} textAnchor="middle">{label}</text></g>)}
      {ticksOf(plane.y.values).map(({ at, label }) => <g key={label}><path d={`M${frame.left} ${marks.toY(at)}h-4`} stroke="var(--ink-2)" /><text x={frame.left - 8} y={marks.toY(at) + 4} textAnchor="end">{label}</text></g>)}
      <text x={frame.left + frame.width / 2} y={HEIGHT - 8} textAnchor="middle">{withUnit(figure.x.label, figure.x.unit)}</text>
      <text transform={`translate(13 ${frame.top + frame.height / 2}) rotate(-90)`} textAnchor="middle">{withUnit(plane.y.label, plane.y.unit)}</text>
    </g>
  );
}

/** The contour has a rim of paper, so that it is seen on the fullest shade as on the palest. */
export function PlaneMap({ figure, plane }: { readonly figure: Figure; readonly plane: FigurePlane }) {
  const marks = planeMarks(figure, plane, frame);
  return (
    <div className="flex flex-wrap items-start gap-x-6 gap-y-2">
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} role="img" aria-label={`Map of ${figure.title}; the same values stand in the table below.`} className="block w-full max-w-[28rem]">
        <rect x={frame.left} y={frame.top} width={frame.width} height={frame.height} fill="var(--sheet)" />
        {marks.shades.map(({ from, opacity, path }) => <path key={from} d={path} fill="var(--trace-recomputed)" fillOpacity={opacity} shapeRendering="crispEdges" />)}
        <path d={marks.contour} fill="none" stroke="var(--sheet)" strokeWidth="5" strokeLinecap="round" />
        <path d={marks.contour} fill="none" stroke="var(--ink)" strokeWidth="2" strokeLinecap="round" />
        {marks.points.map(({ x, y }, i) => <circle key={i} cx={x} cy={y} r="4" fill="var(--sheet)" stroke="var(--ink)" strokeWidth="1.6" />)}
        <rect x={frame.left} y={frame.top} width={frame.width} height={frame.height} fill="none" stroke="var(--ink-2)" />
        <Axes figure={figure} plane={plane} marks={marks} />
      </svg>
      <Legend figure={figure} plane={plane} marks={marks} />
    </div>
  );
}

export const levelWords = (from: number, to: number): string => `${formatNumber(from, { significant: 4 })} to ${formatNumber(to, { significant: 4 })}`;

function Legend({ figure, plane, marks }: { readonly figure: Figure; readonly plane: FigurePlane; readonly marks: PlaneMarks }) {
  return (
    <ul className="grid gap-1 text-micro text-ink-2" aria-label="Key of the map">
      <li className="font-semibold text-ink">{withUnit(plane.level.label, plane.level.unit)}</li>
      {[...marks.shades].reverse().map(({ from, to, opacity }) => (
        <li key={from} className="flex items-center gap-2">
          <svg viewBox="0 0 24 14" aria-hidden="true" className="h-3.5 w-6"><rect width="24" height="14" fill="var(--sheet)" stroke="var(--hair-2)" /><rect width="24" height="14" fill="var(--trace-recomputed)" fillOpacity={opacity} /></svg>
          {levelWords(from, to)}
        </li>
      ))}
      <li className="flex items-center gap-2"><svg viewBox="0 0 24 14" aria-hidden="true" className="h-3.5 w-6"><path d="M0 7H24" stroke="var(--ink)" strokeWidth="2" /></svg>{marks.contour === '' ? `threshold ${formatNumber(plane.threshold)}, nowhere crossed` : `threshold ${formatNumber(plane.threshold)}`}</li>
      {figure.series.map(({ label }) => <li key={label} className="flex items-center gap-2"><svg viewBox="0 0 24 14" aria-hidden="true" className="h-3.5 w-6"><circle cx="12" cy="7" r="4" fill="var(--sheet)" stroke="var(--ink)" strokeWidth="1.6" /></svg>{label}</li>)}
    </ul>
  );
}
