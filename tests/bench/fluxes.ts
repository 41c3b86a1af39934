import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Mode } from '@/lib/engine/contract/waveform';
import { energyFlux } from '@/lib/engine/radiation/flux-figure';
import { angularMomentumProducts, momentumProducts } from '@/lib/engine/radiation/momentum-products';
import { houseSamples, radiationOnSamples } from '@/lib/engine/radiation/news-on-samples';
import { NO_FLOOR } from '@/lib/engine/radiation/radiation-recipe';
import { ratesOf } from '@/lib/engine/radiation/vector-integrals';
import { openReference } from './reference';
import type { Row } from './report';
import { quickest, timed, type Spent } from './stopwatch';

const samples = 100_000;
const lMax = 8;
const step = 0.02;
const rounds = 3;
const runsARound = 3;

/** Bursts of every mode: 77 of them. */
function makeModes(axis: Float64Array): Mode[] {
  const modes: Mode[] = [];
  for (let l = 2; l <= lMax; l++) {
    for (let m = -l; m <= l; m++) {
      const size = (t: number): number => (0.3 / (l * l + Math.abs(m))) * Math.exp(-(((t - 1000 - 3 * m) / (120 + l)) ** 2));
      const phase = (t: number): number => (0.11 * m + 0.02 * l) * t + 0.3 * l;
      modes.push({ l, m, re: axis.map((t) => size(t) * Math.cos(phase(t))), im: axis.map((t) => -size(t) * Math.sin(phase(t))) });
    }
  }
  return modes;
}

function fluxesOf(axis: Float64Array, modes: readonly Mode[]): Float64Array[] {
  const record = { axis, step, variable: 'strain' as const, modes };
  const radiation = radiationOnSamples(record, NO_FLOOR, houseSamples, true);
  return [energyFlux(radiation), ...ratesOf(angularMomentumProducts(modes), radiation), ...ratesOf(momentumProducts(modes), { ...radiation, strain: null })];
}

/** All fluxes of 77 modes against whole-array numpy with the same stencil; refused where the two differ. */
export async function benchFluxes(folder: string): Promise<Row> {
  const axis = Float64Array.from({ length: samples }, (_, i) => i * step);
  const modes = makeModes(axis);
  const path = join(folder, 'modes.bin');
  writeFileSync(path, Buffer.concat(modes.flatMap(({ re, im }) => [re, im]).map((x) => Buffer.from(x.buffer))));
  const reference = openReference('reference-fluxes.py');
  try {
    const [ours, theirs]: [(Spent & { value: Float64Array[] })[], (Spent & { middle: number[]; sum: number[] })[]] = [[], []];
    for (let round = 0; round < rounds; round++) {
      theirs.push(await reference.ask<Spent & { middle: number[]; sum: number[] }>({ path, samples, step, lMax }));
      for (let again = 0; again < runsARound; again++) ours.push(await timed(() => fluxesOf(axis, modes)));
    }
    const [best, script] = [quickest(ours), quickest(theirs)];
    const most = Math.max(...script.middle.map(Math.abs));
    best.value.forEach((flux, i) => {
      if (!(Math.abs(flux[samples / 2]! - script.middle[i]!) <= 1e-9 * most)) throw new Error(`flux ${i}: the two differ, ${flux[samples / 2]} and ${script.middle[i]}`);
    });
    return { what: `fluxes of energy, angular and linear momentum of ${modes.length} modes × 10⁵ samples`, ours: best, theirs: script, target: '≥ 8', note: 'script: numpy, one convolution a mode with the same 13 points, whole arrays for every pair of modes' };
  } finally {
    reference.close();
  }
}
