import { houseLimitObservable } from '../contract/house-values';
import type { Quantity } from '../contract/quantity';
import { measureRadius } from '../extrapolation/measure-radius';
import { neededByObservable, scalars, settingsOfWords, toleranceOfObservable, unitOfObservable, valueWords } from './series-observables';

const words = valueWords(['extrapolationOrder']);

/**
 * A number carried to infinite extraction radius (Q21).
 * Shape:  one number; components `previousOrder`, `largestRadius`, `checkPerturbative`.
 * Units:  those of the observable; radii in M.
 * Error:  U of the runs carried to the limit.
 * Fails:  findings that stop (no radii stated, fewer than the degree and two more, whatever stops the observable).
 * Source: Boyle & Mroué 2009, arXiv:0905.3177; settings.md section 6.
 */
export const radiusExtrapolation: Quantity = {
  id: 'radius-extrapolation',
  title: 'Value at infinite radius',
  symbol: 'X_{r\\to\\infty}',
  unit: unitOfObservable(houseLimitObservable),
  roles: ['series'],
  choices: { observable: Object.keys(words) },
  follows: { setting: 'observable', houseDefault: houseLimitObservable, words },
  needsNoise: false,
  settings: settingsOfWords(words),
  required: (inputs, declared) => neededByObservable(inputs, declared, houseLimitObservable),
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: toleranceOfObservable,
  formula: 'X(r)=\\sum_{k=0}^{N}\\frac{x_k}{r^{k}},\\qquad X_{r\\to\\infty}=x_0',
  measure: measureRadius(scalars, unitOfObservable),
};
