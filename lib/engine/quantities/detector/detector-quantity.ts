import { requiredSettings } from '@/lib/engine/conditioning/detector-settings';
import type { Quantity } from '@/lib/engine/contract/quantity';
import { measureDetector } from './measure-detector';
import type { Recipe } from './recipe';

type Described = Pick<Quantity, 'id' | 'title' | 'symbol' | 'unit' | 'roles' | 'settings' | 'sweepable' | 'naturalTolerance' | 'formula'>;

/** A row of the quantity table from its description and its recipe. */
export const detectorQuantity = (described: Described, recipe: Recipe): Quantity => ({
  ...described,
  needsNoise: true,
  scale: 'absolute',
  required: (inputs, declared, over) => {
    const waveforms = [inputs.of.a, inputs.of.b].filter((w) => w !== undefined);
    return requiredSettings(waveforms, declared, over, recipe.traits(declared));
  },
  measure: (request, watch) => measureDetector({ ...described, recipe }, request, watch),
});
