import { requiredSettings } from '@/lib/engine/conditioning/detector-settings';
import type { Quantity } from '@/lib/engine/contract/quantity';
import { measureDetector } from './measure-detector';
import type { SettingName } from '@/lib/engine/contract/settings';
import type { Recipe } from './recipe';

type Described = Pick<Quantity, 'id' | 'title' | 'symbol' | 'unit' | 'roles' | 'settings' | 'sweepable' | 'naturalTolerance' | 'formula'>;

/** A row of the quantity table from its description and its recipe. */
export const detectorQuantity = (described: Described, recipe: Recipe): Quantity => ({
  ...described,
  needsNoise: true,
  scale: 'absolute',
  required: (inputs, declared, over) => {
    const { a, b, signals = [], templates = [] } = inputs.of;
    const waveforms = [a, b, ...signals, ...templates].filter((w) => w !== undefined);
    const has = (name: SettingName): boolean => declared[name] !== undefined || over === name;
    const own = recipe.requires?.(waveforms, has) ?? [];
    return [...new Set([...requiredSettings(waveforms, declared, over, recipe.traits(declared)), ...own])];
  },
  measure: (request, watch) => measureDetector({ ...described, recipe }, request, watch),
});
