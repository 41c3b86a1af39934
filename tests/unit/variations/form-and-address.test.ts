import { describe, expect, it } from 'vitest';
import { askedVariation, askingQuery } from '@/app/(public)/variations/asked-variation';
import { changesFrom, fieldsFrom, isUnchanged } from '@/app/(public)/variations/variation-fields';
import { changesInWords, inTolerancesText } from '@/app/(public)/variations/variation-words';
import { changesAsWords, changesInput, changesOf } from '@/lib/services/variations/changes';

describe('the form of a variation', () => {
  const declared = { fLowHz: 20, taper: 'none' };
  const nothing = fieldsFrom({});

  it('gives what was typed in the type that the setting asks for', () => {
    const typed = { ...nothing, settings: { fLowHz: '30', modes: '[[2,2]]', maximise: 'time, phase', includeEnergyBeforeStart: 'true', at: '0.3' }, noise: 'named:S' };
    expect(changesFrom(typed, declared)).toEqual({ settings: { fLowHz: 30, modes: [[2, 2]], maximise: ['time', 'phase'], includeEnergyBeforeStart: true, at: { timeM: 0.3 } }, noise: { named: 'S' } });
  });

  it('takes a declared setting away when its box is emptied, and leaves another as it is', () => {
    expect(changesFrom({ ...nothing, settings: { taper: ' ', lMax: '' } }, declared)).toEqual({ settings: { taper: null } });
    expect(isUnchanged(changesFrom({ ...nothing, settings: { lMax: '' } }, declared))).toBe(true);
  });

  it('calls no change what is typed as it was declared', () => {
    expect(changesFrom({ ...nothing, settings: { fLowHz: '20.0', taper: 'none', lMax: '4' } }, declared)).toEqual({ settings: { lMax: 4 } });
    expect(isUnchanged(changesFrom({ ...nothing, settings: { maximise: 'time, phase' } }, { maximise: ['time', 'phase'] }))).toBe(true);
  });

  it('is filled by changes and gives the same back', () => {
    const changes = { settings: { fLowHz: 30, taper: null, response: { plus: 0.5, cross: 0.5 }, modes: 'all' }, noise: { curve: 'G2' }, readings: ['C02:quieter'], mask: { from: -1, to: 2.5 } };
    expect(changesFrom(fieldsFrom(changes), declared)).toEqual(changes);
  });
});

describe('an address that asks for a variation', () => {
  it('fills the form', () => {
    expect(askedVariation({ vary: 'C1', settings: '{"fLowHz":30,"taper":null}', noise: 'G2' })).toEqual({ claimId: 'C1', changes: { settings: { fLowHz: 30, taper: null }, noise: { curve: 'G2' } }, trouble: [] });
    expect(askedVariation({ vary: 'C1', noise: 'named:S' })).toMatchObject({ changes: { noise: { named: 'S' } } });
    const all = { settings: { lMax: 4 }, noise: { curve: 'G2' }, readings: ['C06:maximise=time,phase', 'C02:quieter'], mask: { from: -50.5, to: 10 } };
    expect(askedVariation(Object.fromEntries(askingQuery('C1', all)))).toEqual({ claimId: 'C1', changes: all, trouble: [] });
    for (const bad of [{ readings: 'C02:quieter C02:louder' }, { readings: 'louder' }, { mask: '10,5' }, { mask: 'x' }]) expect(askedVariation({ vary: 'C1', ...bad })?.trouble.length).toBeGreaterThan(0);
    expect(askedVariation({ vary: 'C2' })).toEqual({ claimId: 'C2', changes: {}, trouble: [] });
    expect(askedVariation({ settings: '{"fLowHz":30}' })).toBeNull();
  });

  it('says what of it cannot be read, and changes nothing then', () => {
    for (const settings of ['{"fLowHz":', '{"fLowHz":-1}', '{"fLow":30}', '[1]', '"x"', '{"fLowHz":1e999}', '{"__proto__":{"x":1}}x']) {
      const asked = askedVariation({ vary: 'C1', settings });
      expect(asked?.changes, settings).toEqual({});
      expect(asked?.trouble.length, settings).toBeGreaterThan(0);
    }
    expect(askedVariation({ vary: 'C1', settings: '{"fLowHz":-1}' })?.trouble.join(' ')).toContain('a number above 0 Hz');
  });
});

describe('changes', () => {
  it('are read in both shapes that rows were written in', () => {
    expect(changesOf({ fLowHz: 30, totalMassMsun: 60, noise: { curve: 'G2' } })).toEqual({ settings: { fLowHz: 30, totalMassMsun: 60 }, noise: { curve: 'G2' } });
    expect(changesOf({ noise: { named: 'S' } })).toEqual({ noise: { named: 'S' } });
    expect(changesOf({ settings: { lMax: 4 } })).toEqual({ settings: { lMax: 4 } });
  });

  it('are told in words', () => {
    expect(changesInWords({ settings: { fLowHz: 30, taper: null }, noise: { curve: 'G2' } })).toBe('lower cut-off 30 Hz, taper not declared, noise curve G2, built in');
    const read = { readings: [{ id: 'C02:quieter', clause: 'the spectrum is doubled' }], mask: { from: -50, to: 10 } };
    expect(changesInWords(read)).toBe('as if the spectrum is doubled, without −50 to 10 of the files’ time');
    expect(changesAsWords(read)).toEqual(['as if the spectrum is doubled', 'without −50 to 10 of the files’ time']);
    expect(changesAsWords({ settings: { fLowHz: 30, modes: [[2, 2]] }, noise: { named: 'S' } })).toEqual(['lower cut-off 30 Hz', 'modes [[2,2]]', 'noise curve S']);
    expect([inTolerancesText(2.5), inTolerancesText(-123.4), inTolerancesText(0), inTolerancesText(1e-9), inTolerancesText(null)]).toEqual(['+2.50 T', '−123 T', '0 T', 'less than 0.01 T', 'no tolerance to measure by']);
  });

  it('take every setting of the format', () => {
    expect(changesInput.safeParse({ settings: { cosmology: { h0: 70, omegaM: 0.3 }, window: [10, 50], detectors: 2, average: null } }).success).toBe(true);
  });
});
