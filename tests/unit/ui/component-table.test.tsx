import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { ComponentTable, hasComponents } from '@/app/_ui/claim/component-table';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { resultFixture, must } from './fixtures/result';

const model = must(resultFixture.claims[0]);
const point = must(model.points[0]);
const claimOf = (quantity: string, unit: string, points: readonly Partial<ResultPoint>[]): ResultClaim => ({ ...model, quantity, unit, points: points.map((more) => ({ ...point, at: {}, ...more })) });
const textOf = (claim: ResultClaim): string => renderToStaticMarkup(<ComponentTable claim={claim} />).replace(/<[^>]+>/g, '|').replace(/\|+/g, '|');

describe('what stands beside a number', () => {
  it('is a vector with its direction, each part with its unit', () => {
    const text = textOf(claimOf('recoil', 'km/s', [{ components: { vx: -95.75, vy: 102.6, vz: 0, inPlane: 140.4, directionDeg: 133 } }]));
    expect(text).toContain('Along x|−95|.750');
    expect(text).toContain('Direction in the plane, in the file’s axes|133|°');
  });

  it('is unknown where it is unknown, never zero', () => {
    expect(textOf(claimOf('recoil', 'km/s', [{ components: { directionDeg: null } }]))).toContain('not known');
  });

  it('names shares of modes and fits of groups, in the unit of the claim where it is theirs', () => {
    const text = textOf(claimOf('radiated-energy', '', [{ components: { 'E:3,-3': 0.0012, husa2016: 0.6864 } }]));
    expect(text).toContain('Energy in (3,−3)');
    expect(text).toContain('Husa et al. 2016');
  });

  it('shows a column for each point of a short sweep, and of a long one the point furthest from its claim', () => {
    const sweep = (n: number) => Array.from({ length: n }, (_, i) => ({ at: { totalMassMsun: 60 + i }, apart: i === 3 ? 1 : 0, components: { timeShiftS: i } }));
    expect(textOf(claimOf('match', '', sweep(3)))).toMatch(/60.*61.*62/);
    const long = textOf(claimOf('match', '', sweep(9)));
    expect(long).toContain('63');
    expect(long).not.toContain('64');
  });

  it('is left out where a claim gives nothing beside its number', () => {
    expect(hasComponents(claimOf('overlap', '', [{}]))).toBe(false);
  });
});
