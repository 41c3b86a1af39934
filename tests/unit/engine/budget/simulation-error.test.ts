import { describe, expect, it } from 'vitest';
import { radiusError, togetherAs, truncationError, type RunNumber, type SimulationError } from '@/lib/engine/budget/simulation-error';

const runs = (values: readonly number[], places: readonly number[], own = values.length - 1): RunNumber[] => values.map((value, i) => ({ value, place: places[i]!, isOwn: i === own }));
const spacings = [1 / 80, 1 / 96, 1 / 112];
const ofOrder = (p: number) => spacings.map((h) => 5 - 3 * (80 * h) ** p);

function found(error: SimulationError | null): SimulationError {
  if (error === null) throw new Error('nothing was estimated');
  return error;
}

describe('truncation error', () => {
  it('of three runs of fourth order is 1.25 times the way to the limit, with two degrees of freedom', () => {
    const error = found(truncationError(runs(ofOrder(4), spacings), null, ''));
    expect(error.u).toBeCloseTo(1.25 * 3 * (80 / 112) ** 4, 9);
    expect(error.degreesOfFreedom).toBe(2);
    expect(error.note).toContain('order 4');
  });

  it('is that of the run which the claim uses, and does not depend on the order of the list', () => {
    const error = found(truncationError(runs(ofOrder(4), spacings, 0), null, ''));
    expect(error.u).toBeCloseTo(1.25 * 3, 9);
    expect(found(truncationError(runs(ofOrder(4), spacings, 0).reverse(), null, '')).u).toBeCloseTo(error.u, 12);
  });

  it('takes three times the difference of the two finest where the order is not the formal one', () => {
    const values = ofOrder(2);
    const error = found(truncationError(runs(values, spacings), 4, ''));
    expect(error.u).toBeCloseTo(3 * (values[2]! - values[1]!), 12);
    expect(error.note).toContain('order 2 is not the formal 4');
    expect(found(truncationError(runs(ofOrder(3.5), spacings), 4, '')).note).toContain('Richardson');
  });

  it.each([[12], [0.2]])('takes three times the difference at an order of %f, which no scheme has', (order) => {
    expect(found(truncationError(runs(ofOrder(order), spacings), null, '')).note).toContain('is not one of 1 to 8');
  });

  it('takes three times the difference where there is no order, and says why', () => {
    const error = found(truncationError(runs([1, 2, 1.5], spacings), null, ''));
    expect(error).toMatchObject({ u: -1.5, degreesOfFreedom: 2 });
    expect(error.note).toContain('one direction, then in the other');
    expect(found(truncationError(runs([1, 1.5], [2, 1]), null, ''))).toMatchObject({ u: 1.5, degreesOfFreedom: 1 });
    expect(found(truncationError(runs([1, 1.5], [2, 1], 0), null, '')).u).toBe(1.5);
  });

  it('is told in the unit of the number, with a true minus sign and powers of ten as they are written', () => {
    expect(found(truncationError(runs([5, -5], [2, 1]), null, 'rad')).note).toContain('(−10 rad)');
    expect(found(truncationError(runs(ofOrder(4), spacings), null, 'Hz')).note).toContain('limit 5 Hz;');
    expect(found(truncationError(runs([1, 1.0000025], [2, 1]), null, '')).note).toContain('(2.5×10⁻⁶)');
  });

  it('is not known from one spacing, nor where the claim\'s own run has none', () => {
    expect(truncationError(runs([1], [1]), null, '')).toBeNull();
    expect(truncationError(runs([1, 2], [1, 1]), null, '')).toBeNull();
    expect(truncationError(runs([1, 2], [2, 1], 7), null, '')).toBeNull();
  });
});

describe('error of a finite radius', () => {
  const radii = [60, 80, 100, 120, 160];
  it('is the way to the limit and what the last order adds to it', () => {
    const values = radii.map((r) => 2 - 3 / r);
    const error = found(radiusError(runs(values, radii), ''));
    expect(error.u).toBeCloseTo(3 / 160 / Math.sqrt(3), 9);
    const bent = radii.map((r) => 2 - 3 / r + 50 / r ** 2);
    expect(found(radiusError(runs(bent, radii), '')).u).toBeGreaterThan((2 - bent[4]!) / Math.sqrt(3));
  });
  it('tells the limit and the way to it in the unit of the number, with a true minus sign', () => {
    const kick = radii.map((r) => 167.6 + 100 / r);
    expect(found(radiusError(runs(kick, radii), 'km/s')).note).toMatch(/limit 167\.6 km\/s, −0\.6\d km\/s away; degree 1 differs by \S+ km\/s;/);
    expect(found(radiusError(runs(kick, radii), '')).note).toMatch(/limit 167\.6, −0\.6\d away;/);
  });
  it('is not known from one radius', () => {
    expect(radiusError(runs([1], [60]), '')).toBeNull();
  });
});

describe('errors of two waveforms', () => {
  const part = (from: string, u: number) => ({ from, error: { u, degreesOfFreedom: 2, note: 'so' } });
  it('of one simulation cancel where they move the number to opposite sides; of two they do not', () => {
    expect(togetherAs('E05', [part('U', 0.3), part('U', -0.3)]).u).toBe(0);
    expect(togetherAs('E05', [part('U', 0.3), part('D', -0.4)])).toMatchObject({ u: expect.closeTo(0.5, 12) as number, note: 'U: so D: so' });
  });
});
