import { describe, expect, it } from 'vitest';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import { binary, columns } from '../../../support/detector-claims';

const inM = binary('A');
const axis = Float64Array.of(0, 1, 2);
const physical = (more: Partial<Waveform> = {}) => columns('P', axis, axis, null, more);
const restretched = physical({ ownTotalMassMsun: 30, ownDistanceMpc: 100 });
const required = (id: string, a: Waveform, declared: DeclaredSettings = {}, over: SettingName | null = null, b?: Waveform) =>
  quantities.get(id)!.required({ of: b ? { a, b } : { a }, noise: null }, declared, over);

describe('the table of quantities', () => {
  it('names only settings of the settings table, and sweeps only what it allows', () => {
    for (const { id, settings, sweepable, roles } of quantities.values()) {
      for (const name of settings) expect(settingsTable.has(name), `${id}: ${name}`).toBe(true);
      for (const name of sweepable) expect(settings, `${id} sweeps ${name}`).toContain(name);
      expect(roles.length).toBeGreaterThan(0);
    }
  });

  it('asks for a mass of waveforms in M, and for a distance of their loudness', () => {
    expect(required('snr', inM)).toEqual(['totalMassMsun', 'distanceMpc']);
    expect(required('snr', inM, { distanceMpc: 100 }, 'totalMassMsun')).toEqual([]);
    expect(required('snr', inM, { totalMassMsun: 60, redshift: 0.1 })).toEqual([]);
    expect(required('match', inM, {}, null, inM)).toEqual(['totalMassMsun']);
    expect(required('horizon-distance', inM, { totalMassMsun: 60 })).toEqual([]);
  });

  it('takes physical strain as it stands; a horizon needs its own distance', () => {
    for (const id of ['snr', 'match', 'overlap', 'snr-ratio']) expect(required(id, physical(), {}, null, physical())).toEqual([]);
    expect(required('snr', restretched)).toEqual([]);
    expect(required('horizon-distance', restretched)).toEqual([]);
    expect(required('horizon-distance', physical())).toEqual(['distanceMpc']);
  });

  it('asks for a redshift when a source-frame mass stands without distance', () => {
    expect(required('match', inM, { totalMassMsun: 60, massFrame: 'source' }, null, inM)).toEqual(['redshift']);
    expect(required('match', inM, { totalMassMsun: 60, massFrame: 'source', distanceMpc: 500 }, null, inM)).toEqual([]);
    expect(required('horizon-distance', inM, { totalMassMsun: 60, massFrame: 'source' })).toEqual([]);
  });

  it.each([
    ['overlap', 0.5, 1e-3],
    ['match', 0.999, 1e-4],
    ['match', 0.9, 1e-3],
    ['mismatch', 5e-4, 5e-5],
    ['mismatch', 0.02, 6e-4],
    ['snr', 20, 0.2],
    ['snr-ratio', 2, 0.02],
    ['volume-ratio', 3, 0.09],
    ['horizon-distance', 1000, 10],
  ])('%s has at %d the natural tolerance %d', (id, value, tolerance) => {
    expect(quantities.get(id)!.naturalTolerance(value)).toAgreeWith(tolerance, { relative: 1e-12 });
  });

  it('takes half of the mismatch’s for telling waveforms apart, by the number of parameters', () => {
    const { naturalTolerance } = quantities.get('distinguishability-snr')!;
    expect(naturalTolerance(40)).toAgreeWith(40 * 0.05, 1e-12);
    expect(naturalTolerance(10)).toAgreeWith(10 * 0.015, 1e-12);
    expect(naturalTolerance(40, { parameters: 4 })).toAgreeWith(40 * 0.015, 1e-12);
  });
});
