import { errorBarIndices } from '@/lib/engine/budget/chosen-points';
import { computationError, kitOf } from '@/lib/engine/budget/error-bar';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { matchRecipe } from '@/lib/engine/quantities/detector/match-recipe';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { band, fHighHz, fLowHz, masses } from './sweep';
import { timed, type Spent } from './stopwatch';

export interface ErrorBarCost {
  readonly base: Spent;
  readonly bar: Spent;
  readonly points: number;
  readonly largest: number;
}

/** What a claim pays for its uncertainty: the sweep as the quantity computes it, then the knobs turned at five points. */
export async function errorBarCost([a, b]: readonly [Waveform, Waveform]): Promise<ErrorBarCost> {
  const store = new SpectrumStore();
  const kit = kitOf(houseNumerics, store);
  const { noise } = band();
  const base = await timed(() => {
    const sides = { a: conditionWaveform(a, 'all'), b: conditionWaveform(b, 'all') };
    return masses.map((totalMassMsun) => {
      const declared = { totalMassMsun, fLowHz, fHighHz };
      const request: PointRequest = { ...sides, declared, at: { totalMassMsun }, noise, traits: matchRecipe.traits(declared) };
      return { request, found: matchRecipe.evaluate(kit, request) };
    });
  });
  const chosen = errorBarIndices(masses.length, 100);
  const bar = await timed(() =>
    chosen.map((i) => {
      const at = base.value[i];
      return at ? computationError(matchRecipe, at.request, at.found, store).expanded : Number.NaN;
    }),
  );
  return { base, bar, points: chosen.length, largest: Math.max(...bar.value) };
}
