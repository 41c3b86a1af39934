import { parse, validate } from 'fast-xml-parser';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { axisScale } from '@/app/_ui/charts/axis-scale';
import { axisTicks, niceStep } from '@/app/_ui/charts/export/axis-ticks';
import { figureCsv } from '@/app/_ui/charts/export/figure-csv';
import { figureSvg } from '@/app/_ui/charts/export/figure-svg';
import { fileNameOf, pointWords, type FigureOrigin } from '@/app/_ui/charts/export/figure-words';
import { extentOf, type Frame } from '@/app/_ui/charts/export/frame';
import { bandPath, linePath } from '@/app/_ui/charts/export/trace-paths';
import { traceStyle } from '@/app/_ui/charts/export/trace-style';
import type { Figure } from '@/lib/engine/contract/measurement';
import { figureFixture, must } from './fixtures/result';

const origin: FigureOrigin = { source: 'Counterfoil record 90tf-w8a1, revision 2, https://counterfoil.example/records/90tf-w8a1', stem: 'counterfoil-90tf-w8a1-r2', claimId: 'C1', quantity: 'Match of A and B', place: null };
const figure = (kind: Figure['kind']): Figure => must(figureFixture.find((f) => f.kind === kind));
const svgOf = (of: Figure, range: readonly [number, number] | null = null) => figureSvg({ figure: of, origin, range }).svg;
const wordsIn = (svg: string): readonly string[] => [...svg.matchAll(/<text [^>]*>([^<]*)<\/text>/g)].map((m) => m[1] ?? '');
const hostile: Figure = { ...figure('waveforms'), title: '<script>alert(1)</script> & "quotes"', x: { ...figure('waveforms').x, label: '</text><script/>' }, series: figure('waveforms').series.map((s) => ({ ...s, label: `\u0000<b>&'${s.label}` })) };

const unitFrame = (xs: readonly number[], values: readonly (number | null)[]): Frame => ({ left: 0, top: 0, width: 100, height: 100, x: extentOf(xs, axisScale('linear', xs), 0), y: extentOf(values, axisScale('linear', values), 0) });

describe('a figure saved as SVG', () => {
  it.each(['waveforms', 'sweep', 'integrand'] as const)('is well-formed XML: %s', (kind) => {
    expect(validate(svgOf(figure(kind)))).toBe(true);
  });
  it('carries title, axes with units, each trace’s name and whence it came', () => {
    const words = wordsIn(svgOf(figure('integrand')));
    for (const part of ['Noise and weighted integrand at 60 M⊙', 'frequency [Hz]', 'noise [Hz⁻¹ᐟ²]', 'noise', 'share of ρ² per ln f']) expect(words).toContain(part);
    expect(words.join(' ')).toContain('Counterfoil record 90tf-w8a1, revision 2, https://counterfoil.example/records/90tf-w8a1; claim C1, Match of A and B, the point furthest from its claim.');
    expect(wordsIn(svgOf(figure('sweep')))).toEqual(expect.arrayContaining(['Match of A and B over total mass', 'Total mass [M⊙]', 'Match of A and B', 'error band, ± U']));
  });
  it('says what its vertical axis is of where each trace has a name of its own', () => {
    const trace = { unit: 'rad', axis: 'left', scale: 'linear', values: [1, 2] } as const;
    const named: Figure = { kind: 'curve', title: 'Runs', x: { label: 'Time', unit: 'M', scale: 'linear', values: [0, 1] }, series: [{ ...trace, label: 'low less medium', role: 'noise', quantity: 'phase difference' }, { ...trace, label: 'medium less high', role: 'recomputed', quantity: 'phase difference' }] };
    expect(wordsIn(svgOf(named))).toContain('phase difference [rad]');
    expect(wordsIn(svgOf({ ...named, series: named.series.map((s, i) => (i === 0 ? s : { ...s, quantity: 'phase' })) }))).not.toContain('phase difference [rad]');
  });
  it('calls a band U where it is one, and by its edges elsewhere', () => {
    const edge = { unit: '', axis: 'left', scale: 'linear', values: [1, 2] } as const;
    const fits: Figure = { kind: 'curve', title: 'Fits', x: { label: 'Mass ratio', unit: '', scale: 'linear', values: [1, 2] }, series: [{ ...edge, label: 'Lowest', role: 'band-low' }, { ...edge, label: 'Highest', role: 'band-high' }, { ...edge, label: 'Mean', role: 'recomputed' }] };
    expect(wordsIn(svgOf(fits))).toContain('Lowest – Highest');
    expect(wordsIn(svgOf(fits)).join()).not.toContain('± U');
  });
  it('prints ticks on both axes, on round places', () => {
    const words = wordsIn(svgOf(figure('sweep')));
    expect(words).toEqual(expect.arrayContaining(['50', '100', '150', '200']));
    expect(words).toEqual(expect.arrayContaining(['0.85', '0.90', '0.95', '1.00']));
    expect(wordsIn(svgOf(figure('integrand')))).toEqual(expect.arrayContaining(['10', '100', '500', '10⁻²²']));
  });
  it('lets no label become an element, nor a character that XML forbids', () => {
    const svg = svgOf(hostile);
    expect(validate(svg)).toBe(true);
    expect(svg).not.toMatch(/<script|<b>|\u0000/);
    expect(wordsIn(svg)).toContain('&lt;script&gt;alert(1)&lt;/script&gt; &amp; &quot;quotes&quot;');
    const parsed = JSON.stringify(parse(svg, { ignoreAttributes: false }));
    expect(parsed).not.toMatch(/"script"|onload|foreignObject/);
  });
  it('needs nothing from outside: no address to load, no style, no script', () => {
    const svg = svgOf(figure('waveforms'));
    expect(svg.replace('http://www.w3.org/2000/svg', '')).not.toMatch(/href|<style|style=|<image|url\((?!#)/);
  });
  it('tells two traces apart in grey: no two lines of one figure share a pattern', () => {
    for (const kind of ['waveforms', 'integrand'] as const) {
      const dashes = figure(kind).series.map((s) => traceStyle(figure(kind), s).dash);
      expect(new Set(dashes).size).toBe(dashes.length);
    }
  });
  it('draws only the part that is looked at, and lets that part decide the height', () => {
    const whole = svgOf(figure('waveforms'));
    const part = svgOf(figure('waveforms'), [-400, -300]);
    expect(validate(part)).toBe(true);
    expect(wordsIn(part)).toEqual(expect.arrayContaining(['−400', '−300']));
    expect(wordsIn(part)).not.toContain('−200');
    expect(part).not.toBe(whole);
  });
  it('stands with no values at all', () => {
    const empty: Figure = { ...figure('sweep'), x: { ...figure('sweep').x, values: [] }, series: figure('sweep').series.map((s) => ({ ...s, values: [] })) };
    expect(validate(svgOf(empty))).toBe(true);
    expect(svgOf(empty)).not.toMatch(/NaN|Infinity|undefined/);
  });
});

describe('a line with missing values', () => {
  const xs = [0, 1, 2, 3, 4];
  it('ends before a gap and begins anew behind it; nothing is drawn to zero', () => {
    const values = [1, 2, null, 4, 5];
    expect(linePath(xs, values, unitFrame(xs, values))).toBe('M0.00 100.00L25.00 75.00M75.00 25.00L100.00 0.00');
  });
  it('treats what is not finite as missing', () => {
    expect(linePath(xs, [1, NaN, 3, Infinity, 5], unitFrame(xs, [1, NaN, 3, Infinity, 5]))).toBe('M0.00 100.00M50.00 50.00M100.00 0.00');
  });
  it('leaves a value that has no logarithm out instead of inventing a place', () => {
    const scale = axisScale('log', [1, 10, 100]);
    const frame: Frame = { ...unitFrame([0, 2], [0]), y: extentOf([1, 100], scale, 0) };
    expect(linePath([0, 1, 2], [1, 0, 100], frame)).toBe('M0.00 100.00M100.00 0.00');
  });
  it('closes a band on each side of a gap', () => {
    const values = [0, 0, 0, 0, 4];
    const path = bandPath(xs, [0, 0, null, 0, 0], [1, 1, 1, 1, 4], unitFrame(xs, values));
    expect(path.match(/M/g)).toHaveLength(2);
    expect(path.match(/Z/g)).toHaveLength(2);
  });
});

describe('ticks', () => {
  it('step by 1, 2 or 5 times a power of ten', () => {
    expect([niceStep(10, 5), niceStep(7, 6), niceStep(0.03, 6), niceStep(900, 4)]).toEqual([2, 2, 0.005, 500]);
    expect(axisTicks(axisScale('linear', [0.8, 1]), 0.8, 1, 4).map((t) => t.label)).toEqual(['0.80', '0.85', '0.90', '0.95', '1.00']);
  });
  it('stand on a log axis too short for round powers', () => {
    const ticks = axisTicks(axisScale('log', [20, 2000]), Math.log10(210), Math.log10(390), 5);
    expect(ticks.length).toBeGreaterThanOrEqual(2);
    for (const { at, label } of ticks) expect(Number(label)).toBeCloseTo(10 ** at, 0);
  });
});

describe('the values saved as CSV', () => {
  const lines = (csv: string) => csv.split('\r\n');
  it('begin with what they are, then name each column with its unit', () => {
    const [title, note, header] = lines(figureCsv(figure('integrand'), origin));
    expect(title).toMatch(/^# Noise and weighted integrand at 60 M⊙; Counterfoil record 90tf-w8a1/);
    expect(note).toMatch(/^# 300 points, all that the plot draws\./);
    expect(header).toBe('frequency [Hz],noise [Hz⁻¹ᐟ²],share of ρ² per ln f');
  });
  it('give every value back to the last bit, and an empty cell for none', () => {
    const sweep = figure('sweep');
    const table = Papa.parse<string[]>(figureCsv(sweep, origin), { comments: '#', skipEmptyLines: true }).data.slice(1);
    expect(table).toHaveLength(sweep.x.values.length);
    table.forEach((row, i) => {
      expect(Number(row[0])).toBe(sweep.x.values[i]);
      sweep.series.forEach((s, j) => expect(row[j + 1]).toBe(s.values[i] === null ? '' : String(s.values[i])));
    });
  });
  it('hold no cell that a spreadsheet would run, and keep negative numbers numbers', () => {
    const evil: Figure = { ...figure('waveforms'), title: 'two\r\nlines', series: [{ ...must(figure('waveforms').series[0]), label: '=HYPERLINK("http://x")', values: figure('waveforms').x.values.map(() => -1.5e-22) }] };
    const [title, , header, first] = lines(figureCsv(evil, origin));
    expect(title).toMatch(/^# two lines;/);
    expect(header).toContain(`"'=HYPERLINK(""http://x"")"`);
    expect(first).toBe('-420,-1.5e-22');
  });
});

describe('the name of a saved file', () => {
  it('tells record, claim and figure, in letters that every system takes', () => {
    expect(fileNameOf(figure('integrand'), origin, 'svg')).toBe('counterfoil-90tf-w8a1-r2-C1-integrand.svg');
    expect(fileNameOf(figure('integrand'), { ...origin, claimId: '../C 1é/' }, 'csv')).toBe('counterfoil-90tf-w8a1-r2-C-1e-integrand.csv');
  });
  it('and the caption names the point that is drawn', () => {
    expect(pointWords({ ...figure('waveforms'), at: { totalMassMsun: 60 } }, origin)).toBe('at 60 M⊙');
    expect(pointWords({ ...figure('waveforms'), at: {} }, { ...origin, place: '100 M⊙' })).toBe('at 100 M⊙');
    expect(pointWords(figure('sweep'), origin)).toBe('all 101 points');
  });
});
