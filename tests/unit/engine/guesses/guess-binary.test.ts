import { describe, expect, it } from 'vitest';
import { guessBinary, type StatedBodies } from '@/lib/engine/guesses/binary';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { stated } from '@/lib/formats/stated-masses';

const silent: StatedBodies = { mass1: null, mass2: null, ratio: null, spin1: null, spin2: null, effectiveSpin: null };
const look = (binary: BinaryFacts, head: Partial<StatedBodies> = {}) => guessBinary('A', binary, { ...silent, ...head });
const against = (binary: BinaryFacts, head: Partial<StatedBodies> = {}) => look(binary, head).filter(({ agrees }) => !agrees).map(({ about, value }) => `${about}: ${value}`);

describe('guesses of masses and labels', () => {
  it('propose the mass ratio of the head, heavier over lighter, where none is declared', () => {
    expect(against({}, { mass1: 0.25, mass2: 0.75 })).toEqual(['mass-ratio: 3']);
    expect(against({}, { ratio: 0.5 })).toEqual(['mass-ratio: 2']);
    expect(look({})).toEqual([]);
  });

  it('agree where the head says the same, and ask where it does not', () => {
    expect(look({ massRatio: 2 }, { mass1: 0.6667, mass2: 0.3333 })).toMatchObject([{ agrees: true, value: 2 }]);
    expect(against({ massRatio: 2 }, { mass1: 0.75, mass2: 0.25 })).toEqual(['mass-ratio: 3']);
  });

  it('turn a mass ratio below one round', () => {
    expect(against({ massRatio: 0.25 })).toEqual(['mass-ratio: 4']);
    expect(against({ massRatio: 1 })).toEqual([]);
  });

  it('tell spins on the wrong hole by the spins of the head, or by their sum', () => {
    const head = { mass1: 0.25, mass2: 0.75, spin1: 0.1, spin2: 0.6 };
    expect(against({ massRatio: 3, chi1z: 0.1, chi2z: 0.6 }, head)).toEqual(['labels: exchanged']);
    expect(against({ massRatio: 3, chi1z: 0.6, chi2z: 0.1 }, head)).toEqual([]);
    expect(against({ massRatio: 3, chi1z: 0.1, chi2z: 0.6 }, { effectiveSpin: 0.475 })).toEqual(['labels: exchanged']);
    expect(against({ massRatio: 3, chi1z: 0.6, chi2z: 0.1 }, { effectiveSpin: 0.475 })).toEqual([]);
    expect(against({ massRatio: 3, chi1z: 0.3, chi2z: 0.3 }, { ...head, spin1: null })).toEqual([]);
  });

  it('doubt labels with half a voice where the head only numbers the lighter body first', () => {
    expect(look({ massRatio: 3, chi1z: 0.1, chi2z: 0.6 }, { mass1: 0.25, mass2: 0.75 }).find(({ about }) => about === 'labels')).toMatchObject({ agrees: false, confidence: 0.5 });
  });

  it('explain a spin above one by the mass of the other body where that brings it below', () => {
    expect(against({ massRatio: 2, chi1z: 2 })).toEqual(['spin: 0.5']);
    expect(against({ massRatio: 1, chi1z: 2 })).toEqual(['spin: null']);
    expect(against({ massRatio: 2, chi1z: 1 })).toEqual([]);
  });

  it('are read from heads as they are usually written', () => {
    const head = [{ text: 'mass1 = 0.25, mass2 = 0.75' }, { text: 'spin1z: -1.5e-1; chi_2z=0.6' }, { text: 'chi_eff = 0.41' }];
    expect((['mass1', 'mass2', 'spin1', 'spin2', 'effectiveSpin', 'ratio'] as const).map((name) => stated(head, name)?.value ?? null)).toEqual([0.25, 0.75, -0.15, 0.6, 0.41, null]);
  });
});
