import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import type { ResultClaim } from '@/lib/pipeline/result';
import { runFolder } from './run-folder';

/**
 * The specimens' numbers, required: independent derivation — a numpy evaluation of the same closed-form signals, which shares
 * neither code nor method with either route (domain reference, section 7). Agreement asked for there:
 * match 1e-3, loudness 0.3 %, energy 0.5 %.
 */
let claims: ReadonlyMap<string, ResultClaim>;
const folder = (name: string) => join(process.cwd(), 'content', 'specimens', name);
const values = (id: string): (number | null)[] => claims.get(id)?.points.map(({ value }) => value) ?? [];

describe('spin 0.2 at 60 solar masses', () => {
  beforeAll(async () => void (claims = await runFolder(folder('spin-visible'))), 120_000);
  it('recomputes matches of 0.9185, 0.9889 and 0.9937 from 20 Hz', () => {
    const expected = [0.9185, 0.9889, 0.9937];
    expect(values('C1')).toHaveLength(3);
    values('C1').forEach((value, i) => expect(value).toAgreeWith(expected[i]!, 1e-3));
  });
  it('differs from the claimed 0.9753, 0.9959 and 0.9932 beyond their tolerance', () => {
    expect(claims.get('C1')?.points.map(({ verdict }) => verdict)).toEqual(['differs', 'differs', expect.any(String)]);
    expect(claims.get('C1')?.verdict).toBe('differs');
  });
});

describe('loudness of non-spinning mergers at 1 Gpc', () => {
  beforeAll(async () => void (claims = await runFolder(folder('loudness'))), 120_000);
  it('D3: recomputes 36.30 and 52.68, √2 above the claimed 25.67 and 37.25', () => {
    const expected = [36.3, 52.68];
    const claimed = [25.67, 37.25];
    values('C1').forEach((value, i) => {
      expect(value).toAgreeWith(expected[i]!, { relative: 3e-3 });
      expect((value ?? Number.NaN) / claimed[i]!).toAgreeWith(Math.SQRT2, 1e-3);
    });
    expect(claims.get('C1')?.verdict).toBe('differs');
  });
});

describe('high-precision match of two models', () => {
  beforeAll(async () => void (claims = await runFolder(folder('precise-match'))), 120_000);
  it('D8: agrees with 0.988942 within the natural tolerance', () => {
    expect(values('C1')[0]).toAgreeWith(0.98894, 3e-4);
    expect(claims.get('C1')?.verdict).toBe('agrees');
  });
  it('finds the two resolutions apart by a mismatch of 1e-6', () => {
    expect(values('C2')[0]).toAgreeWith(1e-6, { relative: 0.1 });
    expect(claims.get('C2')?.verdict).toBe('agrees');
  });
});

describe('four per cent of the mass radiated', () => {
  beforeAll(async () => void (claims = await runFolder(folder('radiated-energy'))), 120_000);
  it('recomputes 0.0399 and agrees', () => {
    expect(values('C1')[0]).toAgreeWith(0.03991, { relative: 5e-3 });
    expect(claims.get('C1')?.verdict).toBe('agrees');
  });
});

/** Required: independent derivation — a numpy script (cubic splines, trapezoids) over the same file; another has 140 km/s for an earlier start. */
describe('what a merger of mass ratio 2 carries away', () => {
  beforeAll(async () => void (claims = await runFolder(folder('two-to-one'))), 120_000);
  it('recomputes 0.26074, 8.4346e-4 and 137.64 km/s towards −151°, and agrees', () => {
    expect(values('C1')[0]).toAgreeWith(0.260744801, { relative: 1e-4 });
    expect(values('C2')[0]).toAgreeWith(8.43463864e-4, { relative: 1e-4 });
    expect(values('C3')[0]).toAgreeWith(137.640765, { relative: 1e-4 });
    expect(claims.get('C3')?.points[0]?.components?.directionDeg).toAgreeWith(-150.952206, 1e-2);
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees']);
  });
});

/**
 * Required: the drift of the coarser run is 0.05 rad and 0.002 by construction; lines and alignment by independent derivation,
 * a numpy script (cubic splines, exact edges, Gauss sums) over the same files; the tone itself from the quasi-normal table.
 */
describe('how the remnant rings, and what a coarser run changes', () => {
  beforeAll(async () => void (claims = await runFolder(folder('ringdown-and-resolution'))), 120_000);
  it('recomputes 0.55541 and 0.08549, near the Kerr values 0.55347 and 0.08542', () => {
    expect(values('C1')[0]).toAgreeWith(0.5554165, { relative: 2e-5 });
    expect(values('C2')[0]).toAgreeWith(0.0854899, { relative: 1e-4 });
    expect(claims.get('C1')?.points[0]?.components?.predicted).toAgreeWith(0.55347, { relative: 3e-4 });
    expect(claims.get('C2')?.points[0]?.components?.predicted).toAgreeWith(0.08542, { relative: 3e-4 });
  });
  it('finds the drift that was put in, and what an early alignment makes of it', () => {
    expect(values('C3')[0]).toAgreeWith(0.05, 1e-6);
    expect(values('C5')[0]).toAgreeWith(0.002, 1e-6);
    const { value, expandedUncertainty, components } = claims.get('C4')!.points[0]!;
    expect(value).toAgreeWith(-0.5749647, expandedUncertainty!);
    expect(components!.timeShiftM).toAgreeWith(-2.0079456, 1e-4);
  });
  it('agrees throughout', () => {
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees', 'agrees', 'agrees']);
  });
});

/**
 * Required: independent derivation — closed forms (domain reference, Q24, Q25 and D9: 10⁻¹⁵, 1.8×10⁴⁷ erg, 10⁻¹¹, exponent 2.00, 1.8×10⁻⁴ Hz against
 * 1.6 kHz, 11.5 M☉), and a numpy script (quintic splines, fine trapezoids, padded transforms) over the same files.
 */
describe('an electromagnetic twin', () => {
  beforeAll(async () => void (claims = await runFolder(folder('electromagnetic-twin'))), 120_000);
  const components = (id: string) => claims.get(id)!.points[0]!.components!;
  it('D9: recomputes 1.0089e-15 and 1.0089e-11, an exponent of 2 and a ratio of 2.757e-14', () => {
    expect(values('C1')[0]).toAgreeWith(1.00890945e-15, { relative: 1e-6 });
    expect(values('C2')[0]).toAgreeWith(1.00890945e-11, { relative: 1e-6 });
    expect(components('C1').erg).toAgreeWith(1.803e47, { relative: 1e-3 });
    expect(components('C1').fieldHat).toAgreeWith(4.2446e-8, { relative: 1e-4 });
    expect(values('C3')[0]).toAgreeWith(2.75685e-14, { relative: 1e-4 });
    expect(values('C4')[0]).toAgreeWith(2, 1e-6);
  });
  it('recomputes 1.7925e-4 Hz, far below the cut-off of 1555 Hz, which only mergers below 11.5 solar masses reach', () => {
    expect(values('C5')[0]).toAgreeWith(1.792528e-4, { relative: 1e-5 });
    expect(components('C5').cutoffHz).toAgreeWith(1555.3816, { relative: 1e-6 });
    expect(components('C5').massLimitMsun).toAgreeWith(11.52468, { relative: 1e-5 });
    expect(claims.get('C5')!.findings.map(({ code }) => code)).toContain('engine/below-cutoff');
  });
  it('finds two signals that mirror each other, and contradicts the linear scaling and the observer', () => {
    expect(values('C6')[0]).toAgreeWith(0, 1e-5);
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'differs', 'agrees', 'agrees', 'differs', 'agrees']);
  });
});

/** Required: the closed form the curve is made from: 1.26e45 erg/s over 1.2571e46; 1e52/1.26e45 s and 20^1.5·492.549 s. */
describe('a disc shaken by the recoil', () => {
  beforeAll(async () => void (claims = await runFolder(folder('shaken-disc'))), 120_000);
  it('shines with a tenth of Eddington’s luminosity, and is marked where it cools at once', () => {
    expect(values('C1')[0]).toAgreeWith(1.26e45 / 1.2571e46, { relative: 1e-6 });
    const { coolingS, dynamicalS, accretionErgPerS } = claims.get('C1')!.points[0]!.components!;
    expect([coolingS, dynamicalS, accretionErgPerS].map((x) => Number(x!.toPrecision(4)))).toEqual([7.937e6, 44050, 1.246e45]);
    expect(claims.get('C1')!.findings).toEqual([]);
    expect(claims.get('C2')!.findings.map(({ code }) => code)).toEqual(['engine/cools-at-once']);
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees']);
  });
});

/**
 * Required: published — D6 of the design reference: 0.289 and 0.152 rad, order 2.80, 0.18 rad by order 4 and at least 0.28 rad by
 * the measured one, all closed forms of how the signal was made.
 */
describe('a phase that does not converge as claimed', () => {
  beforeAll(async () => void (claims = await runFolder(folder('unconverged-phase'))), 120_000);
  const component = (id: string, name: string): number => claims.get(id)?.points[0]?.components?.[name] ?? Number.NaN;
  it('D6: shows order 2.80 instead of 4, from differences of 0.289 and 0.152 rad at the peak', () => {
    for (const id of ['C1', 'C2']) {
      expect(claims.get(id)?.verdict).toBe('differs');
      for (const route of ['A', 'B'] as const) expect(claims.get(id)?.points[0]?.routes[route]).toAgreeWith(2.797117, 2e-3);
    }
    expect(component('C2', 'coarseDifferenceRad')).toAgreeWith(0.289284, 1e-5);
    expect(component('C2', 'fineDifferenceRad')).toAgreeWith(0.152318, 1e-5);
  });
  it('D6: finds the stated 0.18 rad understated, at least by what the three runs show', () => {
    expect(claims.get('C3')?.coverage).toMatchObject({ state: 'understated', missing: ['Extraction radius'] });
    expect(claims.get('C3')?.coverage.factor).toAgreeWith(0.53595 / 0.18, 5e-3);
  });
  it('finds the limit by order 4 to be 0.18 rad from the finest run, and three times that the error', () => {
    const distance = Math.abs(component('C3', 'finest') - (values('C3')[0] ?? Number.NaN));
    expect(distance).toAgreeWith(0.17865, 1e-4);
    expect(component('C3', 'errorEstimate')).toAgreeWith(3 * distance, 1e-9);
    expect(claims.get('C3')?.verdict).toBe('agrees');
  });
});

/**
 * Required: order 4 and the terms in 1/r are how the signal was made (domain reference, section 7); the energies by independent
 * derivation, a numpy script over the same files (twelfth-order differences, Simpson's rule, least squares).
 */
describe('a remnant known at three resolutions and four radii', () => {
  beforeAll(async () => void (claims = await runFolder(folder('remnant-by-balance'))), 240_000);
  it('D13: agrees throughout, and its uncertainty covers what resolutions and radii show', () => {
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees', 'agrees', 'agrees']);
    for (const id of ['C1', 'C2', 'C4', 'C5']) expect(claims.get(id)?.coverage.state, id).toBe('covered');
  });
  it('converges with order 4', () => expect(values('C3')[0]).toAgreeWith(4, 1e-3));
  it('carries the energy to zero spacing and to infinite radius', () => {
    expect(values('C4')[0]).toAgreeWith(0.0285305335613, { relative: 1e-6 });
    expect(values('C5')[0]).toAgreeWith(0.0289662518253, { relative: 1e-6 });
  });
});

/** Required: independent derivation — a numpy script (cubic splines, five-sample parabola, Chebyshev fit) over the same file; the swing by construction; fits by the script behind the check table (remnant-fits.test.ts). */
describe('a nearly circular inspiral and what it should leave', () => {
  beforeAll(async () => void (claims = await runFolder(folder('nearly-circular'))), 120_000);
  it('recomputes an eccentricity of 0.00472, of the 0.005 put in, and 18.11 cycles', () => {
    expect(values('C1')[0]).toAgreeWith(0.00472327, { relative: 1e-6 });
    expect(values('C1')[0]).toAgreeWith(0.005, { relative: 0.2 });
    expect(claims.get('C1')?.points[0]?.components?.referenceFrequency).toAgreeWith(0.0223843665, { relative: 1e-6 });
    expect(values('C2')[0]).toAgreeWith(18.1086, claims.get('C2')!.points[0]!.expandedUncertainty!);
  });
  it('reads the fits of the check table', () => {
    expect(values('C3')[0]).toAgreeWith((0.95176 + 0.95151 + 0.95161 + 0.95158) / 4, 1e-5);
    expect(values('C4')[0]).toAgreeWith(0.68642, 1e-5);
    expect(values('C5')[0]).toAgreeWith(156.7, 0.06);
  });
  it('agrees throughout', () => {
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees', 'agrees', 'agrees', 'agrees']);
  });
});

/**
 * Required: independent derivation — a numpy script over the same files (septic splines in time, transforms of 2^15, scipy's not-a-knot spline);
 * the design reference has 65.5 %, 41.3 % and 99.1 % for other records of the same family, see the decision on fitting factors.
 */
describe('what a spin-blind search sees', () => {
  beforeAll(async () => void (claims = await runFolder(folder('spin-blind-search'))), 240_000);
  it('D11: recomputes 65.3 % of the plane, 41.1 % of its diagonal, and 99.2 % with the mass free', () => {
    expect(values('C1')[0]).toAgreeWith(0.6527448, 1e-5);
    expect(values('C2')[0]).toAgreeWith(0.411022, 1e-5);
    expect(values('C3')[0]).toAgreeWith(0.9923699, 1e-5);
    expect(claims.get('C1')?.points[0]?.components?.edgeLow).toAgreeWith(-0.3869981, 1e-5);
    expect(claims.get('C1')?.points[0]?.components?.edgeHigh).toAgreeWith(0.3528415, 1e-5);
  });
  it('recomputes fitting factors of 0.9633 at 89.9 and 0.9939 at 112.2 solar masses', () => {
    expect(values('C4')[0]).toAgreeWith(0.96325, 2e-6);
    expect(values('C5')[0]).toAgreeWith(0.993853, 2e-6);
    expect(claims.get('C4')?.points[0]?.components?.templateMassMsun).toAgreeWith(89.8851, 1e-3);
    expect(claims.get('C5')?.points[0]?.components?.templateMassMsun).toAgreeWith(112.1707, 1e-3);
  });
  it('agrees throughout', () => {
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees', 'agrees', 'agrees']);
  });
});

/**
 * Required: independent derivation — a numpy evaluation has 42.7 from these signals, and 1.142 from a record that begins earlier. 1.1434073 is found in this file by
 * numpy and scipy: the tapered samples in one padded transform of 2²⁰ points, a trapezoid from 20 Hz with linear parts of cells at the edges, the curve G2 as a table
 * of 16000 points along straight lines in the logarithms, distances by adaptive quadrature, the last crossing of 8 in redshift by Brent's method.
 */
describe('a long signal from a short record', () => {
  beforeAll(async () => void (claims = await runFolder(folder('long-signal'))), 300_000);
  it('recomputes 42.7 with the restricted amplitude, and the horizon of this record, 0.001 beyond that of a longer one', () => {
    expect(values('C1')[0]).toAgreeWith(42.7, { relative: 1e-3 });
    expect(claims.get('C1')?.budget.find(({ id }) => id === 'E11')?.note).toMatch(/−3\.\d+ %/);
    // The post-Newtonian part alone leaves more open than the stated 1 %, whatever resolution and radius would add.
    expect(claims.get('C1')?.coverage).toMatchObject({ state: 'understated', missing: expect.arrayContaining(['Extraction radius']) as string[] });
    expect(values('C2')[0]).toAgreeWith(1.143407, 1e-5);
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees']);
  });
});

/** Required: independent derivation — a numpy evaluation has 0.9924 and 0.9726 for a longer record; the last digits by a numpy script over the same files (padded transforms, scipy's minimisation over angles). */
describe('one binary from all sides', () => {
  beforeAll(async () => void (claims = await runFolder(folder('all-sides'))), 300_000);
  it('recomputes 0.9927 and 0.9734 for the quadrupole alone, and agrees', () => {
    [0.9924, 0.9726].forEach((value, i) => expect(values('C1')[i]).toAgreeWith(value, 0.1 * (1 - value)));
    [0.992724, 0.973427].forEach((value, i) => expect(values('C1')[i]).toAgreeWith(value, 2e-5));
    expect(claims.get('C1')?.verdict).toBe('agrees');
  });
  it('D10: finds opposite spins told apart edge-on, where the claim says they are not', () => {
    expect(values('C2')[0]).toAgreeWith(0.987024, 2e-5);
    expect(claims.get('C2')?.points[0]?.components?.inclinationRad).toAgreeWith(Math.PI / 2, 1e-3);
    expect(claims.get('C2')?.verdict).toBe('differs');
  });
});

/**
 * Claims that another reading explains. Required: published — the scenarios of the domain reference (section 7), from a prototype apart from this
 * engine and for finer records of the same binaries: match 1e-3, loudness 0.3 %, energy 0.5 %, recoil 2 %.
 */
describe('claims that follow from their files under another reading', () => {
  const run = async (name: string) => void (claims = await runFolder(folder(name)));
  it('D2: matches of 0.9185 and 0.9889 with the curve as it is declared', { timeout: 120_000 }, async () => {
    await run('weak-spins');
    [0.9185, 0.9889].forEach((value, i) => expect(values('C1')[i]).toAgreeWith(value, 1e-3));
    expect(claims.get('C1')?.points.map(({ verdict }) => verdict)).toEqual(['differs', 'differs']);
  });
  it('D4: 41.30 for the mass at the source, 12 % above the claimed 36.30', { timeout: 120_000 }, async () => {
    await run('source-frame');
    expect(values('C1')[0]).toAgreeWith(41.3, { relative: 3e-3 });
    expect(claims.get('C1')?.verdict).toBe('differs');
  });
  it('D5: 0.0399 without the burst, of which 1.2e-4 is radiated before the start', { timeout: 120_000 }, async () => {
    await run('start-up-radiation');
    expect(values('C1')[0]).toAgreeWith(0.0399, { relative: 5e-3 });
    expect(claims.get('C1')?.points[0]?.components?.before).toAgreeWith(1.2e-4, { relative: 2e-2 });
    expect(claims.get('C1')?.verdict).toBe('differs');
  });
  it('D7: 140.4 km/s with the mirror rule, and the broken rule is seen in the modes as written', { timeout: 120_000 }, async () => {
    await run('recoil-of-two-to-one');
    expect(values('C1')[0]).toAgreeWith(140.4, { relative: 2e-2 });
    expect([...claims.values()].map(({ verdict }) => verdict)).toEqual(['differs', 'agrees']);
    expect(claims.get('C2')?.findings.map(({ code }) => code)).toContain('engine/mirror-broken');
  });
  it('D10: 0.9990 at 30°, 0.9953 at 60°, 0.9871 at 90°, and above 0.9998 with the quadrupole alone', { timeout: 120_000 }, async () => {
    await run('opposite-spins');
    [0.999, 0.9953, 0.9871].forEach((value, i) => expect(values('C1')[i]).toAgreeWith(value, 1e-3));
    expect(values('C2')[0]).toAgreeWith(0.99986, 1e-3);
    expect(claims.get('C1')?.points.map(({ verdict }) => verdict)).toEqual(['agrees', 'differs', 'differs']);
  });
  it('D12: a horizon at redshift 1.142, far beyond 0.72', { timeout: 120_000 }, async () => {
    await run('horizon-of-sixty');
    expect(values('C1')[0]).toAgreeWith(1.142, { relative: 3e-3 });
    expect(claims.get('C1')?.verdict).toBe('differs');
  });
  it('D15: 29.41 with the attached curve, whose name is questioned', { timeout: 120_000 }, async () => {
    await run('typed-by-hand');
    expect(values('C1')[0]).toAgreeWith(29.41, { relative: 3e-3 });
    expect(claims.get('C1')?.verdict).toBe('agrees');
    const asked = claims.get('C1')?.findings.find(({ code }) => code === 'engine/curve-identity');
    expect(asked?.text).toContain('×1.83');
  });
});
