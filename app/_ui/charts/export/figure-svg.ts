import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { light } from '../../tokens';
import { acrossEnds, acrossScale, axisScale } from '../axis-scale';
import { bandWords, isBand, panelsOf, type Panel } from '../panels';
import { axisTicks } from './axis-ticks';
import { pointWords, titleOf, xLabel, yLabel, type FigureOrigin } from './figure-words';
import { extentOf, type Extent, type Frame } from './frame';
import { planeSvg } from './plane-svg';
import { bandPath, barsPath, linePath, pointsOf } from './trace-paths';
import { traceStyle } from './trace-style';
import { xmlText } from './xml-text';

/**
 * A figure as one SVG that stands alone: title, axes with ticks and units, legend, and whence it came.
 * Light paper, generic type, presentation attributes only, so that any program draws it alike.
 */
export interface SvgRequest {
  readonly figure: Figure;
  readonly origin: FigureOrigin;
  /** Horizontal ends in the axis's own unit; null for all of it. */
  readonly range: readonly [number, number] | null;
}

const WIDTH = 800;
const LEFT = 96;
const RIGHT = 24;
const LINE = 18;
const TALL = 280;
const LOW = 140;
const FONT = 'font-family="sans-serif"';

const text = (x: number, y: number, content: string, more = ''): string => `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" ${more}>${xmlText(content)}</text>`;
const line = (x1: number, y1: number, x2: number, y2: number, colour: string): string =>
  `<line x1="${x1.toFixed(1)}" y1="${y1.toFixed(1)}" x2="${x2.toFixed(1)}" y2="${y2.toFixed(1)}" stroke="${colour}" stroke-width="1"/>`;

/** Words broken by their number of letters: an SVG does not break lines itself. */
export function brokenLines(content: string, most: number): readonly string[] {
  const lines: string[] = [];
  for (const word of content.split(/\s+/)) {
    const last = lines.at(-1);
    if (last !== undefined && last.length + 1 + word.length <= most) lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines;
}

/** Only what is seen decides how high an axis goes, with one sample to each side. */
function inRange(figure: Figure, series: FigureSeries, range: SvgRequest['range']): readonly (number | null)[] {
  if (!range) return series.values;
  const xs = figure.x.values;
  return series.values.filter((_, i) => (xs[i + 1] ?? xs[i] ?? 0) >= range[0] && (xs[i - 1] ?? xs[i] ?? 0) <= range[1]);
}

function xExtent({ figure, range }: SvgRequest): Extent {
  return extentOf(range ? [range[0], range[1]] : figure.x.values.length > 0 ? acrossEnds(figure) : [], acrossScale(figure), 0);
}

function axes(frame: Frame, label: string, showsX: boolean): string {
  const { left, top, width, height, x, y } = frame;
  const right = left + width;
  const foot = top + height;
  const across = axisTicks(x.scale, x.low, x.high, 7).map(({ at, label: words }) => {
    const place = left + ((at - x.low) / (x.high - x.low)) * width;
    return line(place, top, place, foot, light.hair) + line(place, foot, place, foot + 4, light.ink) + (showsX ? text(place, foot + 18, words, 'text-anchor="middle"') : '');
  });
  const up = axisTicks(y.scale, y.low, y.high, height > LOW ? 6 : 3).map(({ at, label: words }) => {
    const place = top + (1 - (at - y.low) / (y.high - y.low)) * height;
    return line(left, place, right, place, light.hair) + line(left - 4, place, left, place, light.ink) + text(left - 8, place + 4, words, 'text-anchor="end"');
  });
  const middle = top + height / 2;
  const turned = text(0, 0, label, `text-anchor="middle" transform="translate(16 ${middle.toFixed(1)}) rotate(-90)"`);
  const border = `<rect x="${left}" y="${top}" width="${width}" height="${height}" fill="none" stroke="${light.ink}" stroke-width="1"/>`;
  return across.join('') + up.join('') + border + turned;
}

function traces(figure: Figure, panel: Panel, frame: Frame, clip: string): string {
  const xs = figure.x.values;
  const [low, high] = ['band-low', 'band-high'].map((role) => panel.series.find((s) => s.role === role));
  const blue = light['trace-recomputed'];
  const band = low && high ? (figure.x.words ? `<path d="${barsPath(xs, low.values, high.values, frame)}" fill="none" stroke="${blue}" stroke-width="1.8"/>` : `<path d="${bandPath(xs, low.values, high.values, frame)}" fill="${blue}" fill-opacity="0.2" stroke="none"/>`) : '';
  const drawn = panel.series.filter((s) => !isBand(s)).map((series) => {
    const { colour, width, dash, points, full } = traceStyle(figure, series);
    if (points) return pointsOf(xs, series, frame).map(({ x, y }) => `<circle cx="${x.toFixed(2)}" cy="${y.toFixed(2)}" r="${full ? 3 : 4.5}" fill="${full ? colour : 'none'}" stroke="${colour}" stroke-width="1.8"/>`).join('');
    return `<path d="${linePath(xs, series.values, frame)}" fill="none" stroke="${colour}" stroke-width="${width}"${dash ? ` stroke-dasharray="${dash}"` : ''} stroke-linejoin="round"/>`;
  });
  return `<g clip-path="url(#${clip})">${band}${drawn.join('')}</g>`;
}

interface Placed {
  readonly marks: string;
  readonly height: number;
}

/** Every trace with its own line, two in a row. */
function legend(figure: Figure, top: number): Placed {
  const lines = figure.series.filter((s) => !isBand(s));
  const entries = lines.map((series) => ({ words: series.label, style: traceStyle(figure, series) }));
  const hasBand = figure.series.some((s) => s.role === 'band-high');
  const cells = [...entries.map(({ words, style }) => ({ words, sample: (x: number, y: number) => (style.points ? `<circle cx="${x + 16}" cy="${y - 4}" r="4" fill="${style.full ? style.colour : light.sheet}" stroke="${style.colour}" stroke-width="1.8"/>` : `<path d="M${x} ${y - 4}H${x + 32}" fill="none" stroke="${style.colour}" stroke-width="${style.width}"${style.dash ? ` stroke-dasharray="${style.dash}"` : ''}/>`) })), ...(hasBand ? [{ words: figure.kind === 'sweep' ? `${bandWords(figure)}, ± U` : bandWords(figure), sample: (x: number, y: number) => figure.x.words ? `<path d="M${x + 16} ${y - 10}V${y + 2}" stroke="${light['trace-recomputed']}" stroke-width="1.8"/>` : `<rect x="${x}" y="${y - 9}" width="32" height="10" fill="${light['trace-recomputed']}" fill-opacity="0.2"/>` }] : [])];
  const half = (WIDTH - LEFT - RIGHT) / 2;
  const marks = cells.map(({ words, sample }, i) => {
    const x = LEFT + (i % 2) * half;
    const y = top + LINE * Math.floor(i / 2) + 12;
    return sample(x, y) + text(x + 40, y, words.length > 44 ? `${words.slice(0, 43)}…` : words);
  });
  return { marks: marks.join(''), height: LINE * Math.ceil(cells.length / 2) + 6 };
}

/** Ids are of this file alone, but two files may come to stand in one page. */
const clipId = ({ figure, origin }: SvgRequest, i: number): string => `plot-${origin.claimId.replace(/[^A-Za-z0-9]/g, '')}-${figure.kind}-${i}`;

function panelsFrom(request: SvgRequest, top: number): Placed {
  const { figure, origin, range } = request;
  const x = xExtent(request);
  const panels = panelsOf(figure);
  let at = top;
  const marks = panels.map((panel, i) => {
    const y = extentOf(panel.series.flatMap((s) => inRange(figure, s, range)), axisScale(panel.scale, panel.series.flatMap((s) => s.values)), 0.06);
    const frame: Frame = { left: LEFT, top: at, width: WIDTH - LEFT - RIGHT, height: panel.heightPx > 120 ? TALL : LOW, x, y };
    at += frame.height + (panel.showsX ? 44 : 18);
    const clip = `<clipPath id="${clipId(request, i)}"><rect x="${frame.left}" y="${frame.top}" width="${frame.width}" height="${frame.height}"/></clipPath>`;
    return clip + axes(frame, yLabel(figure, panel.series.filter((s) => !isBand(s)), origin), panel.showsX) + traces(figure, panel, frame, clipId(request, i));
  });
  return { marks: marks.join(''), height: at - top };
}

/** The whole file. */
export function figureSvg(request: SvgRequest): { readonly svg: string; readonly width: number; readonly height: number } {
  const { figure, origin } = request;
  const title = titleOf(figure, origin);
  const caption = `${origin.source}; claim ${origin.claimId}, ${origin.quantity}, ${pointWords(figure, origin)}.`;
  const key = figure.plane ? { marks: '', height: 0 } : legend(figure, 40);
  const body = figure.plane ? planeSvg(figure, figure.plane, LEFT, 48) : panelsFrom(request, 40 + key.height + 8);
  const foot = 40 + key.height + 8 + body.height;
  const lines = brokenLines(caption, 112);
  const height = foot + 16 + lines.length * 16 + 8;
  const svg = [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${height}" viewBox="0 0 ${WIDTH} ${height}" ${FONT} font-size="13" fill="${light.ink}" role="img">`,
    `<title>${xmlText(title)}</title><desc>${xmlText(caption)}</desc>`,
    `<rect width="${WIDTH}" height="${height}" fill="${light.sheet}"/>`,
    text(LEFT, 26, title, 'font-size="16" font-weight="bold"'),
    key.marks,
    body.marks,
    figure.plane ? '' : text(LEFT + (WIDTH - LEFT - RIGHT) / 2, foot - 4, xLabel(figure), 'text-anchor="middle"'),
    ...lines.map((words, i) => text(LEFT, foot + 20 + 16 * i, words, `font-size="11" fill="${light['ink-2']}"`)),
    '</svg>',
  ].join('\n');
  return { svg: `<?xml version="1.0" encoding="UTF-8"?>\n${svg}\n`, width: WIDTH, height };
}
