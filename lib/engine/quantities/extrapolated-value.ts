import { houseLimitObservable } from '../contract/house-values';
import type { Quantity, QuantityInputs } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import { measureExtrapolated } from '../extrapolation/measure-extrapolated';
import { runsApart } from '../extrapolation/runs';
import { neededByObservable, scalars, settingsOfWords, toleranceOfObservable, unitOfObservable, valueWords } from './series-observables';

const words = valueWords(['formalOrder']);

/** Two runs show no order: it has to be said. */
const needsOrder = ({ of }: QuantityInputs, { formalOrder }: DeclaredSettings): boolean => formalOrder === undefined && runsApart('resolution', of.series ?? []).runs.length === 2;

/**
 * A number carried to zero grid spacing (Q20).
 * Shape:  one number; components `order`, `finest`, `errorEstimate`, and `measuredOrder` beside a formal one.
 * Units:  those of the observable.
 * Error:  U of the runs carried to the limit.
 * Fails:  findings that stop (one resolution, equal spacings, no positive order and none declared, whatever stops the observable).
 * Source: domain reference, Q20; settings.md section 6.
 */
export const extrapolatedValue: Quantity = {
  id: 'extrapolated-value',
  title: 'Value at zero grid spacing',
  symbol: 'X_\\infty',
  unit: unitOfObservable(houseLimitObservable),
  roles: ['series'],
  choices: { observable: Object.keys(words) },
  follows: { setting: 'observable', houseDefault: houseLimitObservable, words },
  needsNoise: false,
  settings: settingsOfWords(words),
  required: (inputs, declared) => [...(needsOrder(inputs, declared) ? (['formalOrder'] as const) : []), ...neededByObservable(inputs, declared, houseLimitObservable)],
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: toleranceOfObservable,
  formula: 'X_\\infty=X_3+(X_3-X_2)\\,\\frac{h_3^{p}}{h_2^{p}-h_3^{p}}',
  measure: measureExtrapolated(scalars, unitOfObservable),
};
