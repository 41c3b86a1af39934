import { NuqsTestingAdapter } from 'nuqs/adapters/testing';
import { createElement, type ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { ClaimTable } from '@/app/_ui/claim/claim-table';
import { RecordPage } from '@/app/_ui/claim/record-page';
import type { RecordView } from '@/app/_ui/claim/record-view';
import { visiblePoints } from '@/app/_ui/claim/visible-points';
import { must, recordFixture, resultFixture } from './fixtures/result';

/** A page at an address, as the server draws it. */
const at = (searchParams: string, page: ReactElement) => renderToStaticMarkup(<NuqsTestingAdapter searchParams={searchParams}>{page}</NuqsTestingAdapter>);
const table = (view: RecordView, open: readonly string[] = [], address = '') => at(address, createElement(ClaimTable, { view, open }));
const rowsOf = (html: string, id: string) => html.slice(html.indexOf(`id="${id}"`)).split('</tr>')[0] ?? '';
const text = (html: string) => html.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ');

describe('the claim table', () => {
  const html = table(recordFixture);

  it('is one table with two column groups and a column of holes that is hidden from screen readers', () => {
    expect(html.match(/<table class="ctable"/g)).toHaveLength(1);
    expect(html.match(/scope="colgroup"/g)).toHaveLength(2);
    const holes = html.match(/<td class="perf[^"]*"[^>]*>/g) ?? [];
    expect(holes.length).toBeGreaterThan(0);
    expect(holes.every((cell) => cell.includes('aria-hidden="true"'))).toBe(true);
  });
  it('keeps its roles, which style sheets that stack it would strip', () => {
    for (const role of ['table', 'rowgroup', 'row', 'columnheader', 'rowheader', 'cell']) expect(html).toContain(`role="${role}"`);
    const own = at('', createElement(ClaimTable, { view: recordFixture, closed: true }));
    expect((own.match(/<(td|th)\b/g) ?? []).length).toBeGreaterThan(80);
    expect((own.match(/<(td|th)\b(?![^>]*(role=|aria-hidden))/g) ?? []).length).toBe(0);
  });
  it('names every verdict in words', () => {
    for (const word of ['Agrees', 'Differs', 'Unsettled', 'Not computable', 'Routes disagree']) expect(text(html)).toContain(word);
  });
  it('prints recomputed numbers to the digits the tolerance needs, with U and the distance', () => {
    const row = text(rowsOf(html, 'C1'));
    expect(row).toContain('0 .9753');
    expect(row).toContain('0 .91855');
    expect(row).toContain('−0 .05675');
    expect(row).toMatch(/2 \.0 × 10 −7/);
  });
  it('never shows a missing number as zero or nothing', () => {
    const row = rowsOf(html, 'C6');
    expect(text(row)).toContain('not computable');
    expect(row).toContain('border-dashed');
  });
  it('carries the unit and reads fractions where the scale is a logarithm', () => {
    const row = text(rowsOf(html, 'C3'));
    expect(row).toContain('Mpc');
    expect(row).toMatch(/\+0 \.21 %/);
  });
  it('says before a run that there was none, and does not invent an opened claim', () => {
    const before = table({ ...recordFixture, result: null, run: { state: 'none' } });
    expect(text(before)).toContain('Not run yet');
    expect(before).not.toContain('aria-expanded');
  });
  it('tells the progress of a claim in the verdict’s place', () => {
    const during = table({ ...recordFixture, result: null, run: { state: 'running', steps: [], claims: { C2: 'Route B, 64 %' } } });
    expect(during).toContain('aria-busy="true"');
    expect(text(during)).toContain('Route B, 64 %');
  });
  it('offers sentence and row of every computed number, and none in a summary', () => {
    expect(html.match(/Copy the sentence of C1 at 60 M⊙/g)).toHaveLength(1);
    expect(html.match(/Copy the LaTeX row/g)?.length).toBeGreaterThanOrEqual(9);
    expect(at('', createElement(ClaimTable, { view: recordFixture, closed: true }))).not.toContain('Copy the');
  });
  it('gives desk pages a place beside each number and under each opened claim', () => {
    const slots = { anchor: (claim: string, point: number) => createElement('a', { href: `#t-${claim}-${point}` }, 'thread'), action: (claim: string) => createElement('button', null, `vary ${claim}`) };
    const desk = at('', createElement(ClaimTable, { view: recordFixture, slots }));
    expect(desk).toContain('href="#t-C1-2"');
    expect(desk).toContain('vary C4');
  });
});

describe('an opened claim', () => {
  const html = table(recordFixture, ['C1']);
  it('is reached from a button that says which rows it opens', () => {
    expect(html).toMatch(/aria-expanded="true" aria-controls="C1-left C1-more"/);
    expect(html).toContain('id="C1-left"');
    expect(html).toMatch(/aria-expanded="false" aria-controls="C2-left/);
  });
  it('shows settings with their standing, both routes, whole digests, findings with code and place', () => {
    for (const part of ['declared', 'assumed', 'swept', 'Route A', 'A − B', 'engine/signal-starts-in-band', 'Needs an answer', 'Raise fLowHz']) expect(text(html)).toContain(part);
    expect(html.replace(/<[^>]+>/g, '')).toContain(resultFixture.files[0]?.sha256 ?? 'no file');
  });
  it('keeps what is not available out of the shares and calls it so', () => {
    expect(text(html)).toContain('not available, not zero');
  });
  it('is the one that the address names, whatever stands open at first', () => {
    const named = table(recordFixture, ['C1'], '?open=C2,C4');
    expect(named).toMatch(/aria-expanded="false" aria-controls="C1-left/);
    expect(named).toMatch(/aria-expanded="true" aria-controls="C2-left/);
    expect(table(recordFixture, ['C1'], '?open=')).not.toContain('aria-expanded="true"');
  });
  it('draws a still picture of each panel, for readers without script', () => {
    expect((html.match(/preserveAspectRatio="none"/g) ?? []).length).toBeGreaterThanOrEqual(5);
    expect(html).toContain('role="slider"');
  });
});

describe('a long sweep', () => {
  const points = Array.from({ length: 201 }, (_, i) => ({ ...must(resultFixture.claims[0]?.points[2]), verdict: i === 117 ? ('differs' as const) : ('agrees' as const), apart: i === 117 ? 0.1 : 1e-5 }));
  it('shows both ends and the worst point among a few rows', () => {
    const shown = visiblePoints(201, points);
    expect(shown.length).toBeLessThanOrEqual(8);
    expect(shown).toContain(0);
    expect(shown).toContain(200);
    expect(shown).toContain(117);
    expect([...shown].sort((a, b) => a - b)).toEqual(shown);
  });
  it('shows all points when there are few', () => {
    expect(visiblePoints(3, null)).toEqual([0, 1, 2]);
  });
});

describe('the record page', () => {
  it('keeps machine reading and editor’s decision in two boxes', () => {
    const html = text(at('', createElement(RecordPage, { view: recordFixture, trail: { href: '/register', label: 'Register' } })));
    expect(html).toContain('What the machine reads');
    expect(html).toContain('What the editor decided');
    expect(html).toContain('Of 7 claims 3 agree, 1 differs, 1 is unsettled, 1 is not computable and 1 has routes that disagree');
  });
});
