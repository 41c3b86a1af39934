import type { PublishedFit } from '../contract/settings';
import type { Binary } from '../synthesis/binary';
import { buonannoSpin } from './buonanno-2008';
import { campanelliRecoil } from './campanelli-2007';
import { inDecimalArithmetic as decimals } from './fits-in-decimals';
import { healyMass, healySpin } from './healy-2014';
import { healyLuminosity } from './healy-2017';
import { husaRadiatedEnergy, husaSpin } from './husa-2016';
import { jimenezRadiatedEnergy, jimenezSpin } from './jimenez-2017';
import { keitelLuminosity } from './keitel-2017';
import { panMass, panSpin } from './pan-2011';

/**
 * Remnants: what published fits say of the hole that is left, how it rings, and what a balance leaves
 * of mass and spin. Fits are closed forms with printed coefficients; nothing here is fitted anew.
 */
export const fitObservables = ['mass', 'spin', 'peak-luminosity', 'recoil'] as const;
export type FitObservable = (typeof fitObservables)[number];
export type FitName = Exclude<PublishedFit, 'mean'>;

type Fit = (binary: Binary) => number;

export interface PublishedValue {
  readonly byRouteA: Fit;
  readonly byRouteB: Fit;
}

interface Group {
  readonly name: FitName;
  readonly says: Readonly<Partial<Record<FitObservable, PublishedValue>>>;
  readonly onlyWithoutSpin?: true;
  /** An estimate stands beside the fits and enters neither mean nor spread. */
  readonly isEstimate?: true;
  /** Largest mass ratio and spin from which the fit was made, where the source at hand says so. */
  readonly madeFrom?: { readonly massRatio: number; readonly spin: number };
}

/** Every fit by name, in the order in which they are shown. */
export const groups: readonly Group[] = [
  { name: 'pan2011', onlyWithoutSpin: true, says: { mass: { byRouteA: panMass, byRouteB: decimals.panMass }, spin: { byRouteA: panSpin, byRouteB: decimals.panSpin } } },
  { name: 'healy2014', says: { mass: { byRouteA: healyMass, byRouteB: decimals.healyMass }, spin: { byRouteA: healySpin, byRouteB: decimals.healySpin } } },
  {
    name: 'husa2016',
    madeFrom: { massRatio: 18, spin: 1 },
    says: { mass: { byRouteA: (binary) => 1 - husaRadiatedEnergy(binary), byRouteB: decimals.husaMass }, spin: { byRouteA: husaSpin, byRouteB: decimals.husaSpin } },
  },
  {
    name: 'jimenez2017',
    madeFrom: { massRatio: 18, spin: 0.98 },
    says: { mass: { byRouteA: (binary) => 1 - jimenezRadiatedEnergy(binary), byRouteB: decimals.jimenezMass }, spin: { byRouteA: jimenezSpin, byRouteB: decimals.jimenezSpin } },
  },
  { name: 'buonanno2008', isEstimate: true, says: { spin: { byRouteA: buonannoSpin, byRouteB: decimals.buonannoSpin } } },
  { name: 'keitel2017', says: { 'peak-luminosity': { byRouteA: keitelLuminosity, byRouteB: decimals.keitelLuminosity } } },
  { name: 'healy2017', says: { 'peak-luminosity': { byRouteA: healyLuminosity, byRouteB: decimals.healyLuminosity } } },
  { name: 'campanelli2007', says: { recoil: { byRouteA: campanelliRecoil, byRouteB: decimals.campanelliRecoil } } },
];

export interface FitReading {
  readonly name: FitName;
  readonly value: number;
  readonly isEstimate: boolean;
}

/**
 * What each fit that applies to a binary says of an observable.
 * Shape:  one entry a fit, in the order of `groups`.
 * Units:  mass in M, spin dimensionless, luminosity in c⁵/G, recoil in km/s.
 * Error:  each fit's own; see there.
 * Fails:  never; a fit made without spin is left out for a binary that has some.
 * Source: domain reference, Q17 and appendix A.
 */
export function readFits(observable: FitObservable, binary: Binary, route: 'A' | 'B'): FitReading[] {
  const spins = binary.chi1z !== 0 || binary.chi2z !== 0;
  return groups.flatMap(({ name, says, onlyWithoutSpin, isEstimate }): FitReading[] => {
    const fit = says[observable];
    if (fit === undefined || (onlyWithoutSpin && spins)) return [];
    return [{ name, value: (route === 'A' ? fit.byRouteA : fit.byRouteB)(binary), isEstimate: isEstimate === true }];
  });
}

/** Plain mean of the fits, estimates left out. */
export function meanOf(readings: readonly FitReading[]): number {
  const values = readings.filter(({ isEstimate }) => !isEstimate).map(({ value }) => value);
  return values.reduce((total, value) => total + value, 0) / values.length;
}

/** Lowest and highest of the fits, estimates left out. */
export function bandOf(readings: readonly FitReading[]): readonly [low: number, high: number] {
  const values = readings.filter(({ isEstimate }) => !isEstimate).map(({ value }) => value);
  return [Math.min(...values), Math.max(...values)];
}

/** Half of that range; null where one group alone speaks. */
export function halfRangeOf(readings: readonly FitReading[]): number | null {
  if (readings.filter(({ isEstimate }) => !isEstimate).length < 2) return null;
  const [low, high] = bandOf(readings);
  return (high - low) / 2;
}
