import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Growth, GrowthPoint } from './growth';

const [width, height] = [640, 400];
const frame = { left: 72, right: 616, top: 24, bottom: 340 };
/** Ink, second ink, rule and the two series, as on the screens in daylight. */
const colour = { ink: '#1f2328', soft: '#59636e', rule: '#d1d9e0', engine: '#0b57a4', script: '#9a5b00' };

interface Scale {
  readonly place: (value: number) => number;
  readonly ticks: readonly number[];
}

/** Whole decades around the values. */
function scaleOf(values: readonly number[], from: number, to: number): Scale {
  const [low, high] = [Math.floor(Math.log10(Math.min(...values))), Math.ceil(Math.log10(Math.max(...values)))];
  const decades = Math.max(1, high - low);
  return {
    place: (value) => from + ((to - from) * (Math.log10(value) - low)) / decades,
    ticks: Array.from({ length: decades + 1 }, (_, i) => 10 ** (low + i)),
  };
}

const fixed = (x: number): string => x.toFixed(2);
const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const powerOf = (value: number): string => {
  const power = Math.round(Math.log10(value));
  return `10${power < 0 ? '⁻' : ''}${[...String(Math.abs(power))].map((digit) => superscripts[Number(digit)]).join('')}`;
};

const text = (x: number, y: number, words: string, anchor: string, fill = colour.ink, more = ''): string =>
  `<text x="${fixed(x)}" y="${fixed(y)}" text-anchor="${anchor}" fill="${fill}"${more}>${words}</text>`;

function series(points: readonly GrowthPoint[], of: 'engine' | 'script', x: Scale, y: Scale): string[] {
  const places = points.map((point) => [fixed(x.place(point.size)), fixed(y.place(point[of]))] as const);
  const last = points.at(-1);
  return [
    `<polyline fill="none" stroke="${colour[of]}" stroke-width="2"${of === 'script' ? ' stroke-dasharray="6 4"' : ''} points="${places.map((place) => place.join(',')).join(' ')}"/>`,
    ...places.map(([px, py]) => `<circle cx="${px}" cy="${py}" r="3.5" fill="${colour[of]}"/>`),
    ...(last ? [text(x.place(last.size) - 8, y.place(last[of]) - 10, of, 'end', colour[of])] : []),
  ];
}

/** Log–log, the same bytes for the same numbers. */
export function growthFigure({ axis, what, figure, points }: Growth): void {
  const x = scaleOf(points.map(({ size }) => size), frame.left, frame.right);
  const y = scaleOf(points.flatMap(({ engine, script }) => [engine, script]), frame.bottom, frame.top);
  const lines = [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" font-family="sans-serif" font-size="13" role="img" aria-label="Processor seconds of script and engine by ${axis}">`,
    `<title>Cost of a sweep by ${what}</title>`,
    `<rect width="${width}" height="${height}" fill="#ffffff"/>`,
    ...x.ticks.map((tick) => `<line x1="${fixed(x.place(tick))}" y1="${frame.top}" x2="${fixed(x.place(tick))}" y2="${frame.bottom}" stroke="${colour.rule}"/>`),
    ...y.ticks.map((tick) => `<line x1="${frame.left}" y1="${fixed(y.place(tick))}" x2="${frame.right}" y2="${fixed(y.place(tick))}" stroke="${colour.rule}"/>`),
    ...x.ticks.map((tick) => text(x.place(tick), frame.bottom + 20, powerOf(tick), 'middle', colour.soft)),
    ...y.ticks.map((tick) => text(frame.left - 8, y.place(tick) + 4, powerOf(tick), 'end', colour.soft)),
    text((frame.left + frame.right) / 2, height - 16, axis, 'middle'),
    text(18, (frame.top + frame.bottom) / 2, 'processor time in s', 'middle', colour.ink, ` transform="rotate(-90 18 ${(frame.top + frame.bottom) / 2})"`),
    ...series(points, 'script', x, y),
    ...series(points, 'engine', x, y),
    '</svg>',
  ];
  writeFileSync(join(process.cwd(), 'content', figure), `${lines.join('\n')}\n`);
}
