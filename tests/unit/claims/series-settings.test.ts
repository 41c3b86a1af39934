import { describe, expect, it } from 'vitest';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { formatProblem } from '@/lib/kernel/problem';
import { catalogue } from '@/lib/pipeline/catalogue';

type Json = Record<string, unknown>;
const run = (n: number): Json => ({ file: `n${n}.txt`, columns: ['t', 're22', 'im22'], series: 'U', resolution: 1 / n });
const sheet = (claim: Json, waveforms: Json = { A: run(80), B: run(96), C: run(112) }): Json => ({ format: 'counterfoil-claim/1', title: 'Runs', waveforms, claims: [{ id: 'C1', of: { series: 'U' }, claimed: '4.0', ...claim }] });

function problems(claim: Json, waveforms?: Json): string {
  const parsed = parseClaimSheet(sheet(claim, waveforms), catalogue);
  return parsed.ok ? '' : parsed.error.map(formatProblem).join('\n');
}

describe('a claim about a series', () => {
  it.each<[string, Json]>([
    ['convergence-order', {}],
    ['convergence-order', { observable: 'complex', modes: [[2, 2]], window: [100, 500] }],
    ['convergence-order', { observable: 'recoil', normaliseBy: 'M', startM: 50 }],
    ['extrapolated-value', { formalOrder: 4, includeEnergyBeforeStart: false }],
    ['extrapolated-value', { observable: 'phase-at-peak', startM: 10 }],
    ['radius-extrapolation', { observable: 'ringdown-frequency', window: [25, 60], extrapolationOrder: 3 }],
  ])('of %s takes %j', (quantity, settings) => expect(problems({ quantity, settings })).toBe(''));

  it.each<[string, Json, string]>([
    ['convergence-order', { observable: 'phase', lMax: 4 }, '/claims/0/settings/lMax: saw the setting "lMax"; expected a setting of convergence-order with observable "phase": observable, modes, window, startM, integrationFloor'],
    ['convergence-order', { lMax: 4 }, 'a setting of convergence-order with observable "dominant"'],
    ['convergence-order', { observable: 'amplitude-at-peak' }, 'one of "dominant", "phase", "amplitude", "complex"'],
    ['extrapolated-value', { observable: 'dominant' }, 'one of "radiated-energy"'],
    ['extrapolated-value', { extrapolationOrder: 2 }, 'a setting of extrapolated-value'],
    ['radius-extrapolation', { observable: 'phase-at-peak', window: [1, 2] }, 'with observable "phase-at-peak"'],
    ['radius-extrapolation', { includeEnergyBeforeStart: true }, '/claims/0/settings/massRatio: saw nothing'],
  ])('of %s refuses %j, and says what goes with the observable', (quantity, settings, sentence) => expect(problems({ quantity, settings })).toContain(sentence));

  it('asks for the order where only two runs are given', () => {
    const two = { A: run(80), B: run(96) };
    expect(problems({ quantity: 'extrapolated-value' }, two)).toContain('the setting "formalOrder": extrapolated-value has no default for it with these waveforms');
    expect(problems({ quantity: 'extrapolated-value', settings: { formalOrder: 4 } }, two)).toBe('');
  });
  it('is swept over nothing', () => expect(problems({ quantity: 'convergence-order', over: { startM: [0, 1] }, claimed: ['4', '4'] })).toContain('/claims/0/over/startM'));
});
