import type { Quantity } from '../contract/quantity';
import { fitWords } from '../remnant/fit-figure';
import { binaryOfInputs } from '../remnant/fit-point';
import { measureFit } from '../remnant/measure-fit';
import { fitObservables } from '../remnant/published-fits';

/**
 * What published fits say of the remnant (Q17).
 * Shape:  one number; components are each fit by name and `halfRange`. A waveform may stand for mass ratio and spins.
 * Units:  M for the mass, none for the spin, c⁵/G for the luminosity, km/s for the recoil.
 * Error:  U of the arithmetic alone; the scatter of the fits decides coverage.
 * Fails:  findings that stop (a fit that does not give the observable, or was made without spin).
 * Source: domain reference, appendix A; settings.md section 5.
 */
export const remnantFit: Quantity = {
  id: 'remnant-fit',
  title: 'Remnant by published fits',
  symbol: 'M_f,\\ \\chi_f,\\ \\mathcal L,\\ v',
  unit: fitWords.mass.unit,
  roles: ['a'],
  optionalRoles: ['a'],
  choices: { observable: fitObservables },
  follows: { setting: 'observable', houseDefault: 'mass', words: Object.fromEntries(fitObservables.map((observable) => [observable, { unit: fitWords[observable].unit }])) },
  needsNoise: false,
  settings: ['observable', 'fit', 'massRatio', 'chi1z', 'chi2z'],
  required: (inputs, declared) => (binaryOfInputs(inputs, declared) === null ? ['massRatio'] : []),
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: (value, declared) => (declared?.observable === 'peak-luminosity' || declared?.observable === 'recoil' ? 0.05 * Math.abs(value) : 1e-3),
  formula: 'X_{\\mathrm{mean}}=\\frac1n\\sum_{k=1}^{n}X_k(q,\\chi_1,\\chi_2)',
  measure: measureFit,
};
