import { describe, expect, it } from 'vitest';
import { houseCosmology, luminosityDistanceMpc } from '@/lib/engine/units/cosmology';
import { binary, measured, valueOf } from '../../../support/detector-claims';

const a = binary('A');
const band = { fLowHz: 20, fHighHz: 1000 } as const;
const horizon = (settings: object) => measured({ quantity: 'horizon-distance', a, settings: { ...band, ...settings } });

/** One horizon for several looks: it takes hundreds of spectra. */
const found = horizon({ totalMassMsun: 60 });

describe('a ratio of loudnesses', () => {
  it('stands at the distance of the redshift that it is given', () => {
    const settings = { ...band, totalMassMsun: 50, massFrame: 'source', redshift: 0.4 } as const;
    const { components } = measured({ quantity: 'snr-ratio', a, b: a, settings }).points[0]!;
    expect(components!['rhoA']).toAgreeWith(valueOf({ quantity: 'snr', a, settings }), { relative: 1e-12 });
  });
});

describe('the horizon', () => {
  it('in the detector’s frame is the distance times ρ over the threshold', () => {
    const rho = valueOf({ quantity: 'snr', a, settings: { ...band, totalMassMsun: 80, distanceMpc: 500 } });
    const { points, assumed } = horizon({ totalMassMsun: 80, massFrame: 'detector' });
    expect(points[0]!.value!).toAgreeWith((500 * rho) / 8, { relative: 1e-12 });
    expect(assumed).toContain('threshold');
    expect(assumed).not.toContain('massFrame');
    expect(assumed).not.toContain('cosmology');
  });

  it('as a redshift rests on the cosmology in either frame', () => {
    const request = { quantity: 'horizon-redshift', a, settings: { ...band, totalMassMsun: 80, massFrame: 'detector' } } as const;
    expect(measured(request).assumed).toContain('cosmology');
  });

  it('in the source’s frame is where ρ[(1+z)M, D_L(z)] meets the threshold, by both routes', () => {
    const { value, components, routes } = found.points[0]!;
    const z = components!['redshift']!;
    expect(value!).toAgreeWith(luminosityDistanceMpc(z, houseCosmology), { relative: 1e-12 });
    const rho = valueOf({ quantity: 'snr', a, settings: { ...band, totalMassMsun: 60 * (1 + z), distanceMpc: value! } });
    expect(rho).toAgreeWith(8, 1e-6);
    expect(routes.B!).toAgreeWith(value!, { relative: 1e-7 });
    expect(components!['rootCount']).toBe(1);
    expect(found.assumed).toEqual(expect.arrayContaining(['massFrame', 'threshold', 'cosmology', 'average']));
  });

  it('needs twice the detectors for √2 the threshold', () => {
    const two = horizon({ totalMassMsun: 60, detectors: 2, threshold: 8 * Math.SQRT2 }).points[0]!;
    expect(two.value!).toAgreeWith(found.points[0]!.value!, { relative: 1e-8 });
  });

  it('that is nowhere reached cannot be computed', () => {
    const { points, findings } = horizon({ totalMassMsun: 60, threshold: 1e9 });
    expect(points[0]!.value).toBeNull();
    expect(findings.map((f) => [f.code, f.level])).toContainEqual(['engine/no-horizon', 'stops-lodging']);
  });

  it('compares comoving volumes by their own horizons', () => {
    const settings = { ...band, totalMassMsun: 60, rateLaw: 'comoving' } as const;
    const b = binary('B', { chi1z: -0.5, chi2z: -0.5 });
    const ratio = measured({ quantity: 'volume-ratio', a, b, settings });
    expect(ratio.points[0]!.value!).toBeGreaterThan(1);
    const cube = valueOf({ quantity: 'volume-ratio', a, b, settings: { ...settings, rateLaw: 'euclidean' } });
    expect(ratio.points[0]!.value!).toBeLessThan(cube);
    expect(ratio.points[0]!.components!['redshiftA']!).toAgreeWith(found.points[0]!.components!['redshift']!, 1e-7);
  });
});
