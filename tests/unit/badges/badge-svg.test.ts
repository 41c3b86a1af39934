import { describe, expect, it } from 'vitest';
import { badgeText, drawBadge, type BadgeFacts } from '@/lib/badges/badge-svg';
import { RECORD_STANDINGS } from '@/lib/badges/standing';

const facts = (over: Partial<BadgeFacts> = {}): BadgeFacts => ({ recordId: '4q7m-2tnd', revision: 2, standing: 'entered', word: 'all agree', level: 2, on: '2026-11-28', ...over });

const everyDay = Array.from({ length: 366 }, (_, i) => new Date(Date.UTC(2028, 0, 1 + i)).toISOString().slice(0, 10));

describe('a badge', () => {
  it('says in words what it shows', () => {
    const svg = drawBadge(facts());
    expect(svg).toContain('<title id="T">Counterfoil: all claims agree · level 2</title>');
    expect(svg).toContain('<desc id="D">Record 4q7m-2tnd, revision 2, entered 28 Nov 2026. Live state: the record page.</desc>');
  });

  it('stays under 6 KB on every day, at every level and standing', () => {
    const sizes = RECORD_STANDINGS.flatMap((standing) => [1, 2, 3].flatMap((level) => everyDay.map((on) => Buffer.byteLength(drawBadge(facts({ standing, level, on, word: 'some agree', revision: 12 }))))));
    expect(Math.max(...sizes)).toBeLessThan(6 * 1024);
  });

  it('asks for nothing from outside and runs nothing', () => {
    for (const standing of RECORD_STANDINGS) {
      const svg = drawBadge(facts({ standing }));
      expect(svg).not.toMatch(/<script|<a[ >]|<image|<foreignObject|<style|\bon\w+=|url\(|xlink/i);
      expect([...svg.matchAll(/href="([^"]*)"/g)].every(([, to]) => to?.startsWith('#'))).toBe(true);
    }
  });

  it('has as many teeth as the level has steps, and halves that meet only when all agree', () => {
    const teeth = (svg: string): number => (svg.match(/d="M0 0H\d+((?:v-?\d+l23 23l-23 23)*)V/)?.[1]?.match(/v/g) ?? []).length;
    expect([1, 2, 3].map((level) => teeth(drawBadge(facts({ level }))))).toEqual([1, 2, 3]);
    expect(drawBadge(facts())).toContain('V184H0z');
    expect(drawBadge(facts({ word: 'some agree' }))).toContain('V169H0z');
  });

  it('no longer claims agreement once its standing has changed', () => {
    const texts = RECORD_STANDINGS.filter((s) => s !== 'entered').map((standing) => badgeText(facts({ standing })));
    expect(texts).toEqual(['under recheck', 'superseded', 'lapsed', 'struck']);
    expect(drawBadge(facts({ standing: 'struck' }))).not.toMatch(/agree|level/);
  });
});
