import { houseOrderObservable } from '../contract/house-values';
import type { Quantity } from '../contract/quantity';
import { measureOrder } from '../extrapolation/measure-order';
import { neededByObservable, orderWords, scalars, settingsOfWords } from './series-observables';

/**
 * Order at which the three finest runs of a series converge (Q20).
 * Shape:  one number; components are the orders of each curve, the pointwise ones and the two differences.
 * Units:  none; spacings in M.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (fewer than three resolutions, equal spacings, no positive order up to 20).
 * Source: domain reference, Q20; settings.md section 6.
 */
export const convergenceOrder: Quantity = {
  id: 'convergence-order',
  title: 'Order of convergence',
  symbol: 'p',
  unit: '',
  roles: ['series'],
  choices: { observable: Object.keys(orderWords) },
  follows: { setting: 'observable', houseDefault: houseOrderObservable, words: orderWords },
  needsNoise: false,
  settings: settingsOfWords(orderWords),
  required: (inputs, declared) => neededByObservable(inputs, declared, houseOrderObservable),
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: () => 0.5,
  formula: '\\frac{h_1^{p}-h_2^{p}}{h_2^{p}-h_3^{p}}=\\frac{D_{12}}{D_{23}},\\qquad D_{ij}^2=\\int\\bigl(X_i-X_j\\bigr)^2dt',
  measure: measureOrder(scalars),
};
