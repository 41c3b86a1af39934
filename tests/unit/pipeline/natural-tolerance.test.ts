import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { Quantity } from '@/lib/engine/contract/quantity';
import { distinguishabilitySnr } from '@/lib/engine/quantities/distinguishability-snr';
import { formatProblem } from '@/lib/kernel/problem';
import { reproduceWith } from '@/lib/pipeline/reproduce-with';
import type { ResultPoint } from '@/lib/pipeline/result';
import { smallCatalogue } from '../../support/small-catalogue';

const files: Readonly<Record<string, string>> = { 'a.txt': '0 1 2\n1 3 4\n', 'b.txt': '0 1 2\n1 3 5\n', 'noise.txt': '10 2e-23\n1000 2e-23\n' };
const columns = ['t', 're22', 'im22'];

/** The weighed point of a claim on a distinguishability SNR whose routes gave what the test says. */
async function weighed(routes: { A: number; B: number }, claimed: unknown, settings: object): Promise<ResultPoint> {
  const measurement: Measurement = {
    points: [{ at: {}, value: routes.A, routes, expandedUncertainty: 1e-6 }],
    budget: [], findings: [], assumed: [], settings: [], routeBPoints: [0], figures: [],
  };
  const quantity: Quantity = { ...distinguishabilitySnr, measure: () => measurement };
  const sheetJson = {
    format: 'counterfoil-claim/1',
    title: 'How loud is loud enough',
    waveforms: { A: { file: 'a.txt', columns }, B: { file: 'b.txt', columns } },
    noise: { S: { file: 'noise.txt', columns: ['f', 'asd'] } },
    claims: [{ id: 'C1', quantity: quantity.id, of: { a: 'A', b: 'B' }, noise: 'S', settings: { totalMassMsun: 60, ...settings }, claimed }],
  };
  const openFile = async function* open(name: string) {
    yield new TextEncoder().encode(files[name]);
  };
  const digest = () => {
    const hash = createHash('sha256');
    return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
  };
  const catalogue = { ...smallCatalogue(), quantities: new Map([[quantity.id, quantity]]) };
  const outcome = await reproduceWith(catalogue, { sheetJson, openFile }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest });
  if (!outcome.ok) throw new Error(outcome.error.map(formatProblem).join('\n'));
  const [point] = outcome.value.result.claims[0]?.points ?? [];
  if (!point) throw new Error('no point');
  return point;
}

describe('the natural tolerance of a distinguishability SNR', () => {
  // Half of the mismatch's: at 40 the mismatch is D/3200, 3·10⁻⁴ for one parameter (5 %) and 1.25·10⁻³ for four (1.5 %).
  it.each([
    ['one parameter, undeclared', {}, 2, 'agrees'],
    ['one parameter, declared', { parameters: 1 }, 2, 'agrees'],
    ['four parameters', { parameters: 4 }, 0.6, 'differs'],
  ])('is that of %s', async (_, settings, tolerance, verdict) => {
    const point = await weighed({ A: 41, B: 41 }, 40, settings);
    expect(point.tolerance).toAgreeWith(tolerance, 1e-12);
    expect(point.verdict).toBe(verdict);
  });

  it.each([
    ['one parameter', {}, 'agrees'],
    ['four parameters', { parameters: 4 }, 'routes-disagree'],
  ])('judges the routes under a bound by %s', async (_, settings, verdict) => {
    expect((await weighed({ A: 40, B: 40.3 }, { above: 30 }, settings)).verdict).toBe(verdict);
  });
});
