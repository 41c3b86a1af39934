import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';
import { formatNumber } from '../../math/format-number';
import { light } from '../../tokens';
import { axisScale } from '../axis-scale';
import { levelWords } from '../plane/plane-map';
import { planeMarks, type PlaneFrame } from '../plane/plane-marks';
import { axisTicks } from './axis-ticks';
import { withUnit } from './figure-words';
import { xmlText } from './xml-text';

const text = (x: number, y: number, content: string, more = ''): string => `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" ${more}>${xmlText(content)}</text>`;
const ticksOf = (values: readonly number[]) => axisTicks(axisScale('linear', values), values[0] ?? 0, values.at(-1) ?? 1, 6);

function key(figure: Figure, plane: FigurePlane, marks: ReturnType<typeof planeMarks>, left: number, top: number): string {
  const rows = [
    ...[...marks.shades].reverse().map(({ from, to, opacity }) => ({ sample: (y: number) => `<rect x="${left}" y="${y - 11}" width="24" height="14" fill="${light['trace-recomputed']}" fill-opacity="${opacity}" stroke="${light['hair-2']}"/>`, words: levelWords(from, to) })),
    { sample: (y: number) => `<path d="M${left} ${y - 4}h24" stroke="${light.ink}" stroke-width="2"/>`, words: `threshold ${formatNumber(plane.threshold)}` },
    ...figure.series.map(({ label }) => ({ sample: (y: number) => `<circle cx="${left + 12}" cy="${y - 4}" r="4" fill="${light.sheet}" stroke="${light.ink}" stroke-width="1.6"/>`, words: label })),
  ];
  return text(left, top, withUnit(plane.level.label, plane.level.unit), 'font-weight="bold"') + rows.map(({ sample, words }, i) => sample(top + 22 * (i + 1)) + text(left + 34, top + 22 * (i + 1), words)).join('');
}

/** The map on light paper: shaded cells, contour, computed places, axes and key. */
export function planeSvg(figure: Figure, plane: FigurePlane, left: number, top: number): { readonly marks: string; readonly height: number } {
  const frame: PlaneFrame = { left, top, width: 440, height: 440 };
  const foot = top + frame.height;
  const marks = planeMarks(figure, plane, frame);
  const cells = marks.shades.map(({ path, opacity }) => `<path d="${path}" fill="${light['trace-recomputed']}" fill-opacity="${opacity}" shape-rendering="crispEdges"/>`).join('');
  const contour = [[5, light.sheet], [2, light.ink]].map(([width, colour]) => `<path d="${marks.contour}" fill="none" stroke="${colour}" stroke-width="${width}" stroke-linecap="round"/>`).join('');
  const points = marks.points.map(({ x, y }) => `<circle cx="${x.toFixed(2)}" cy="${y.toFixed(2)}" r="4" fill="${light.sheet}" stroke="${light.ink}" stroke-width="1.6"/>`).join('');
  const border = `<rect x="${left}" y="${top}" width="${frame.width}" height="${frame.height}" fill="none" stroke="${light.ink}"/>`;
  const across = ticksOf(figure.x.values).map(({ at, label }) => `<path d="M${marks.toX(at).toFixed(1)} ${foot}v4" stroke="${light.ink}"/>${text(marks.toX(at), foot + 18, label, 'text-anchor="middle"')}`).join('');
  const up = ticksOf(plane.y.values).map(({ at, label }) => `<path d="M${left} ${marks.toY(at).toFixed(1)}h-4" stroke="${light.ink}"/>${text(left - 8, marks.toY(at) + 4, label, 'text-anchor="end"')}`).join('');
  const names = text(left + frame.width / 2, foot + 40, withUnit(figure.x.label, figure.x.unit), 'text-anchor="middle"') + text(0, 0, withUnit(plane.y.label, plane.y.unit), `text-anchor="middle" transform="translate(30 ${top + frame.height / 2}) rotate(-90)"`);
  return { marks: cells + contour + points + border + across + up + names + key(figure, plane, marks, left + frame.width + 32, top + 14), height: frame.height + 52 };
}
