import { describe, expect, it } from 'vitest';
import { binary, measured } from '../../../support/detector-claims';

const a = binary('A', { stepM: 2, modes: ['22'] });

describe('the figures of a horizon and of a join', () => {
  it('draw the loudness over redshift, which falls through the threshold at the horizon', () => {
    const { points, figures } = measured({ quantity: 'horizon-redshift', a, settings: { totalMassMsun: 60, fLowHz: 20 }, withFigures: true });
    const figure = figures.find(({ title }) => title.startsWith('Loudness over redshift'));
    const z = points[0]?.value ?? Number.NaN;
    const at = figure?.x.values.indexOf(z) ?? -1;
    const [rho, threshold, horizon] = figure?.series ?? [];
    expect(figure?.x).toMatchObject({ label: 'redshift', scale: 'log' });
    expect(rho?.values[at]).toAgreeWith(8, 1e-6);
    expect([threshold?.values[0], horizon?.values[at], horizon?.points]).toEqual([8, 8, true]);
    expect(figure?.x.values.every((x, i) => (rho?.values[i] ?? 0) > 8 === x < z || i === at)).toBe(true);
  });

  it('draw both amplitudes of a hybrid, the part of the file that is left out too', () => {
    const { figures } = measured({ quantity: 'hybrid-snr', a, settings: { totalMassMsun: 60, distanceMpc: 400, fLowHz: 20, joinHz: 40, massRatio: 1 }, withFigures: true });
    const join = figures.find(({ title }) => title === 'Amplitudes on both sides of the join');
    expect(join?.series.map(({ role, unit }) => [role, unit])).toEqual([['recomputed', '1/Hz'], ['noise', '1/Hz'], ['claimed', '1/Hz']]);
    const [used, left] = join?.series ?? [];
    for (const [i, f] of (join?.x.values ?? []).entries()) expect([used?.values[i] !== null, left?.values[i] !== null].filter(Boolean).length <= 1 && (f >= 40 ? left?.values[i] === null : used?.values[i] === null)).toBe(true);
  });
});
