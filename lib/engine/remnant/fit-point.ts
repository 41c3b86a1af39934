import { houseValues } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { MeasureRequest, QuantityInputs } from '../contract/quantity';
import type { DeclaredSettings, PublishedFit } from '../contract/settings';
import { binaryOf, type Binary, type BinaryParameters } from '../synthesis/binary';
import { stop } from '../tones/measure-tones';
import { fitObservables, groups, type FitObservable } from './published-fits';

/** A claim about published fits, its settings filled in. */
export interface FitPoint {
  readonly observable: FitObservable;
  readonly fit: PublishedFit;
  /** As declared or as the waveform has it. */
  readonly given: BinaryParameters;
  /** The heavier body first, as the fits want it. */
  readonly binary: Binary;
  /** Spins that neither sheet nor waveform states count as none. */
  readonly spinAssumed: { readonly chi1z: boolean; readonly chi2z: boolean };
}

/** What the remnant is read for unless `observable` says otherwise. */
export const houseFitObservable: FitObservable = 'mass';

/**
 * Mass ratio and spins of a claim: declared, else the waveform's.
 * Shape:  one binary; null without a mass ratio.
 * Units:  dimensionless.
 * Error:  none.
 * Fails:  null.
 * Source: settings.md section 1 (`binary` numbers).
 */
export function binaryOfInputs({ of: { a } }: QuantityInputs, declared: DeclaredSettings): BinaryParameters | null {
  const massRatio = declared.massRatio ?? a?.binary.massRatio;
  if (massRatio === undefined) return null;
  return { massRatio, chi1z: declared.chi1z ?? a?.binary.chi1z ?? 0, chi2z: declared.chi2z ?? a?.binary.chi2z ?? 0 };
}

/** The same two bodies with the heavier one first. */
export const heavierFirst = (given: BinaryParameters): Binary =>
  binaryOf(given.massRatio >= 1 ? given : { massRatio: 1 / given.massRatio, chi1z: given.chi2z, chi2z: given.chi1z });

const observableNames: Readonly<Record<FitObservable, string>> = { mass: 'the remnant’s mass', spin: 'the remnant’s spin', 'peak-luminosity': 'the peak luminosity', recoil: 'the recoil' };

const words = (names: readonly string[]): string => (names.length === 1 ? names[0]! : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`);

function unfit({ observable, fit, binary }: FitPoint, where: string): Finding | null {
  const group = groups.find(({ name }) => name === fit);
  if (group === undefined) return null;
  if (group.says[observable] === undefined) {
    const others = groups.filter(({ says }) => says[observable] !== undefined).map(({ name }) => name);
    return stop('engine/fit-not-applicable', where, `The fit ${fit} does not give ${observableNames[observable]}.`, `Declare fit: mean, or one that does: ${words(others)}.`);
  }
  if (!group.onlyWithoutSpin || (binary.chi1z === 0 && binary.chi2z === 0)) return null;
  return stop('engine/fit-not-applicable', where, `The fit ${fit} was made for bodies without spin; the claim's spins are ${binary.chi1z} and ${binary.chi2z}.`, 'Declare another fit, or spins of 0 if that is what is meant.');
}

/**
 * Fills in the settings of a claim about published fits.
 * Shape:  one point.
 * Units:  dimensionless.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 5 (`remnant-fit`).
 */
export function fitPoint({ claimId, inputs, settings }: MeasureRequest): FitPoint | Finding {
  const given = binaryOfInputs(inputs, settings);
  if (given === null) return stop('engine/no-signal', claimId, 'No mass ratio is stated, so no fit can be evaluated.', 'Declare massRatio, or state it beside the waveform.');
  const named = settings.observable ?? houseFitObservable;
  const observable = fitObservables.find((known) => known === named);
  if (observable === undefined) return stop('engine/fit-not-applicable', claimId, `No published fit gives ${named}.`, `Declare one of ${words(fitObservables)}.`);
  const facts = inputs.of.a?.binary ?? {};
  const isOpen = (name: 'chi1z' | 'chi2z'): boolean => settings[name] === undefined && facts[name] === undefined;
  const point: FitPoint = { observable, fit: settings.fit ?? houseValues.fit, given, binary: heavierFirst(given), spinAssumed: { chi1z: isOpen('chi1z'), chi2z: isOpen('chi2z') } };
  return unfit(point, claimId) ?? point;
}
