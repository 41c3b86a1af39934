import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { ResultClaim } from '@/lib/pipeline/result';

/**
 * Seven modes in closed form, neither mirrored nor without m = 0: H = a·sech((t − 60)/12)·e^(−iψ), ψ = m(0.1t + 0.0004t²) + c,
 * for m = 0 ψ = 0.15t + c. Source of the numbers: an independent derivation, a script in numpy from the formulas of Q12 to Q14 alone,
 * with the derivative in closed form, 600 Gauss nodes in time, and the recoil by direct quadrature of n̂|ḣ|² over the sphere
 * (its mode sums give the same to 10⁻¹⁵).
 */
type ModeTable = readonly (readonly [l: number, m: number, a: number, c: number])[];
const seven: ModeTable = [[2, 2, 0.3, 0], [2, -2, 0.25, 1], [2, 1, 0.05, 0.4], [2, -1, 0.04, -0.7], [2, 0, 0.02, 2], [3, 3, 0.06, -0.3], [3, -3, 0.03, 0.5]];
const upper: ModeTable = seven.filter(([, m]) => m > 0);

function text(modes: ModeTable, sense: 1 | -1 = 1): string {
  const lines = Array.from({ length: 601 }, (_, i) => {
    const t = i / 5;
    const samples = modes.flatMap(([, m, a, c]) => {
      const size = a / Math.cosh((t - 60) / 12);
      const phase = (m === 0 ? 0.15 * t : m * (0.1 * t + 0.0004 * t * t)) + c;
      return [size * Math.cos(phase), -sense * size * Math.sin(phase)];
    });
    return [t, ...samples].map((x) => x.toExponential(16)).join(' ');
  });
  return `${lines.join('\n')}\n`;
}

const columns = (modes: ModeTable): string[] => ['t', ...modes.flatMap(([l, m]) => [`re${l}${m}`, `im${l}${m}`])];
const files: Readonly<Record<string, string>> = { 'seven.txt': text(seven), 'upper.txt': text(upper), 'turned.txt': text(upper, -1), 'one.txt': text(seven.slice(0, 1)) };
const waveforms = {
  S: { file: 'seven.txt', columns: columns(seven), negativeM: 'given' },
  U: { file: 'upper.txt', columns: columns(upper), negativeM: 'mirror' },
  T: { file: 'turned.txt', columns: columns(upper), negativeM: 'mirror' },
  P: { file: 'one.txt', columns: columns(seven.slice(0, 1)), variable: 'phi2', totalMassMsun: 3e8, binary: { fieldGauss: 1e6 } },
};

async function run(claims: readonly object[], search: boolean): Promise<readonly ResultClaim[]> {
  const openFile = async function* open(name: string) {
    yield new TextEncoder().encode(files[name]);
  };
  const digest = () => {
    const hash = createHash('sha256');
    return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
  };
  const sheetJson = { format: 'counterfoil-claim/1', waveforms, claims: claims.map((claim, i) => ({ id: `C${i}`, ...claim })) };
  const done = await reproduce({ sheetJson, openFile }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest, ...(search ? { explain: { endedBy: () => null } } : {}) });
  if (!done.ok) throw new Error(JSON.stringify(done.error));
  return done.value.result.claims;
}

const near = (value: unknown, expected: number, relative: number): void => expect(Math.abs(Number(value) - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));

describe('energy, angular momentum and recoil of modes without any symmetry', () => {
  it.each([
    ['from the first sample', {}, 0.007051796077, [-2.776727203e-5, 0.001130050747, 0.04625297468], [26.45518949, 22.80255066, -276.4831825], 278.6804327],
    ['from between two samples', { startM: 43.1 }, 0.00672839419, [-9.668468042e-6, 0.001262511649, 0.04396962108], [28.61300333, 24.83048099, -263.8462331], 266.5522303],
  ] as const)('%s', async (_, settings, energy, j, v, speed) => {
    const of = { a: 'S' };
    const [e, angular, recoil] = await run([
      { quantity: 'radiated-energy', of, settings, claimed: energy },
      { quantity: 'radiated-angular-momentum', of, settings, claimed: j[2] },
      { quantity: 'recoil', of, settings: { ...settings, normaliseBy: 'M' }, claimed: speed },
    ], false);
    near(e?.points[0]?.value, energy, 1e-7);
    (['x', 'y', 'z'] as const).forEach((axis, i) => near(angular?.points[0]?.components?.[axis], j[i]!, 1e-6));
    (['vx', 'vy', 'vz'] as const).forEach((axis, i) => near(recoil?.points[0]?.components?.[axis], v[i]!, 1e-6));
    near(recoil?.points[0]?.components?.directionDeg, (Math.atan2(v[1], v[0]) * 180) / Math.PI, 1e-6);
  });
});

describe('a planted reading is found', () => {
  const first = async (claim: object): Promise<ResultClaim['candidates'][number] | undefined> => (await run([claim], true))[0]?.candidates[0];

  it('half the recoil, where modes of negative m were left out and the plane alone was looked at: by the sphere, to every digit', async () => {
    const found = await first({ quantity: 'recoil', of: { a: 'U' }, settings: { normaliseBy: 'M' }, claimed: '60.37', tolerance: 0.02 });
    expect(found).toMatchObject({ id: 'C24:absent-in-plane', standing: 'candidate' });
    near(found?.values[0], 60.36843791, 1e-6);
  });

  it('the sense of rotation behind the sign of an angular momentum, together with the label that does the same', async () => {
    const found = await first({ quantity: 'radiated-angular-momentum', of: { a: 'T' }, claimed: '0.055806' });
    expect(found).toMatchObject({ id: 'C22:conjugate-a', standing: 'candidate' });
    expect(found?.readings.flatMap(({ conventions }) => conventions)).toEqual(['C22', 'C23']);
    near(found?.values[0], 0.05580598747, 1e-6);
  });

  it.each([
    ['C50:linear-from-1000000', (1e4 / 1e6) * (1e8 / 3e8) ** 2],
    ['C50:no-mass', (1e4 / 1e6) ** 2],
  ])('an energy carried on from the field and mass of its own file: %s', async (id, law) => {
    // ∫|φ₂|²dt = 24·a²·tanh 5, over 4π.
    const claimed = ((24 * 0.09 * Math.tanh(5)) / (4 * Math.PI)) * law;
    const found = await first({ quantity: 'em-energy', of: { a: 'P' }, settings: { fieldGauss: 1e4, totalMassMsun: 1e8 }, claimed: claimed.toExponential(4), tolerance: 0.002 });
    expect(found).toMatchObject({ id, standing: 'candidate' });
    near(found?.values[0], claimed, 1e-6);
  });
});
