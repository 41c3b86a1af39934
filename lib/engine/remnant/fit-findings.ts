import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { FitPoint } from './fit-point';
import { groups } from './published-fits';

function beyond({ observable, fit, binary }: FitPoint, where: string): Finding[] {
  const spin = Math.max(Math.abs(binary.chi1z), Math.abs(binary.chi2z));
  const outside = groups.filter(({ name, says, madeFrom }) => (fit === 'mean' || fit === name) && says[observable] !== undefined && madeFrom !== undefined && (binary.massRatio > madeFrom.massRatio || spin > madeFrom.spin));
  return outside.map(({ name, madeFrom }): Finding => ({
    code: 'engine/fit-beyond-range', level: 'worth-a-look', where,
    text: `The fit ${name} was made from simulations with mass ratios up to ${madeFrom!.massRatio} and spins up to ${madeFrom!.spin}; here they are ${Number(binary.massRatio.toPrecision(6))} and ${spin}. It is continued beyond them.`,
    fix: 'Say in the statement that the fit is extrapolated.',
  }));
}

/**
 * What the use of a fit leaves to ask: parameters beyond those it was made from.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  dimensionless.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: settings.md section 1; ranges from public source text that quotes the papers.
 */
export const fitFindings = (point: FitPoint, request: MeasureRequest): Finding[] => beyond(point, request.claimId);
