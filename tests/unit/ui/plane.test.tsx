import { validate } from 'fast-xml-parser';
import Papa from 'papaparse';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { figureCsv } from '@/app/_ui/charts/export/figure-csv';
import { figureSvg } from '@/app/_ui/charts/export/figure-svg';
import { PlaneMap } from '@/app/_ui/charts/plane/plane-map';
import { boundaries, planeMarks } from '@/app/_ui/charts/plane/plane-marks';
import { thinnedPlaces } from '@/app/_ui/charts/plane/plane-table';
import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';
import { overlayFigures } from '@/app/(public)/variations/overlay';

const grid = [-1, -0.5, 0, 0.5, 1];
/** A level that falls away from the diagonal s = χ₁ + χ₂ = 0. */
const plane = (threshold: number, gap = false): FigurePlane => ({
  y: { label: 'spin of the lighter body', unit: '', values: grid },
  level: { label: 'best match', unit: '', values: grid.flatMap((y, j) => grid.map((x, i) => (gap && i === 2 && j === 2 ? null : 1 - 0.1 * Math.abs(x + y)))) },
  threshold,
});
const figure = (threshold: number, gap = false): Figure => ({
  kind: 'plane', title: 'A plane', x: { label: 'spin of the heavier body', unit: '', scale: 'linear', values: grid },
  series: [{ label: 'sampled signals', unit: '', role: 'noise', axis: 'left', scale: 'linear', points: true, values: grid }],
  plane: plane(threshold, gap),
});
const frame = { left: 0, top: 0, width: 400, height: 400 };
const origin = { source: 'a record', stem: 'x', claimId: 'C1', quantity: 'Detectable fraction', place: null };

describe('a map of two settings', () => {
  it('shades by level, with the threshold as the edge between two shades', () => {
    const steps = boundaries(plane(0.9));
    expect(steps).toHaveLength(7);
    expect(steps[3]).toBe(0.9);
    const { shades } = planeMarks(figure(0.9), plane(0.9), frame);
    expect(shades.map(({ opacity }) => opacity)).toEqual([...shades.map(({ opacity }) => opacity)].sort((p, q) => p - q));
    expect(shades.reduce((n, { path }) => n + path.split('Z').length - 1, 0)).toBe(16);
  });

  it('draws the contour where the level is the threshold, and none where it is nowhere', () => {
    const { contour } = planeMarks(figure(0.9), plane(0.9), frame);
    // |χ₁ + χ₂| = 1: from (−1, 0) to (0, −1), and from (0, 1) to (1, 0), through nodes of the grid.
    const ends = [...contour.matchAll(/[ML]([\d.]+) ([\d.]+)/g)].map(([, x, y]) => [Number(x) / 200 - 1, 1 - Number(y) / 200] as const);
    expect(ends.length).toBeGreaterThan(3);
    for (const [x, y] of ends) expect(Math.abs(Math.abs(x + y) - 1)).toBeLessThan(1e-9);
    expect(planeMarks(figure(0.5), plane(0.5), frame).contour).toBe('');
  });

  it('leaves a cell without a level empty, and marks the places that were computed', () => {
    const { shades, points } = planeMarks(figure(0.9, true), plane(0.9, true), frame);
    expect(shades.reduce((n, { path }) => n + path.split('Z').length - 1, 0)).toBe(12);
    expect(points.map(({ x, y }) => [x, y])).toEqual([[0, 400], [100, 300], [200, 200], [300, 100], [400, 0]]);
  });

  it('stands on the page with a name, a key in words and both axes', () => {
    const html = renderToStaticMarkup(<PlaneMap figure={figure(0.9)} plane={plane(0.9)} />);
    for (const part of ['role="img"', 'best match', 'threshold 0.9', 'sampled signals', 'spin of the heavier body', 'spin of the lighter body', '0.9667 to 1']) expect(html).toContain(part);
    expect(renderToStaticMarkup(<PlaneMap figure={figure(0.5)} plane={plane(0.5)} />)).toContain('nowhere crossed');
  });

  it('is saved as SVG that is well formed, and as CSV with a row for each place', () => {
    const { svg } = figureSvg({ figure: figure(0.9), origin, range: null });
    expect(validate(svg)).toBe(true);
    expect(svg).toContain('>spin of the lighter body</text>');
    const rows = Papa.parse<string[]>(figureCsv(figure(0.9), origin), { comments: '#', skipEmptyLines: true }).data;
    expect([rows[0], rows[2], rows.length]).toEqual([['spin of the heavier body', 'spin of the lighter body', 'best match'], ['-0.5', '-1', '0.85'], 26]);
  });

  it('is thinned as a table to what can be read, ends kept', () => {
    expect([thinnedPlaces(5), thinnedPlaces(61).length, thinnedPlaces(61)[0], thinnedPlaces(61).at(-1)]).toEqual([[0, 1, 2, 3, 4], 13, 0, 60]);
  });

  it('is not laid over another: a variation’s stands beside it', () => {
    expect(overlayFigures([figure(0.9)], [figure(0.8)]).map(({ title, plane: drawn }) => [title, drawn?.threshold])).toEqual([['A plane', 0.9], ['A plane, varied', 0.8]]);
  });
});
