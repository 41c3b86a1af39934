import type { Figure, FigureSeries } from '../contract/measurement';
import { binaryOf } from '../synthesis/binary';
import type { FitPoint } from './fit-point';
import { bandOf, meanOf, readFits, type FitObservable, type FitReading } from './published-fits';

const POINTS = 48;
const LEAST_REACH = 4;

interface Wording {
  readonly name: string;
  readonly unit: string;
}

export const fitWords: Readonly<Record<FitObservable, Wording>> = {
  mass: { name: 'Mass of the remnant', unit: 'M' },
  spin: { name: 'Spin of the remnant', unit: '' },
  'peak-luminosity': { name: 'Peak luminosity', unit: 'c⁵/G' },
  recoil: { name: 'Recoil', unit: 'km/s' },
};

/** Mass ratios around the claim's, which is one of them. */
function ratios(q: number): number[] {
  const last = Math.max(LEAST_REACH, 2 * q);
  const even = Array.from({ length: POINTS }, (_, i) => 1 + (i * (last - 1)) / (POINTS - 1));
  return [...new Set([...even, q])].sort((a, b) => a - b);
}

const drawn = { axis: 'left', scale: 'linear' } as const;

/**
 * Each group's value over the mass ratio at the claim's spins: as it is where one group speaks, else less
 * the mean, with the band that the groups span. Estimates that stand far off are left to the components.
 * Shape:  thinned to a screen's width.
 * Units:  those of the observable.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: domain reference, Q17.
 */
export function fitFigure({ observable, fit, binary }: FitPoint): Figure {
  const x = ratios(binary.massRatio);
  const rows = x.map((massRatio) => readFits(observable, binaryOf({ massRatio, chi1z: binary.chi1z, chi2z: binary.chi2z }), 'A').filter(({ isEstimate, name }) => !isEstimate || name === fit));
  const { name, unit } = fitWords[observable];
  const isBand = (readings: readonly FitReading[]): boolean => readings.filter(({ isEstimate }) => !isEstimate).length > 1;
  const banded = isBand(rows[0]!);
  const quantity = banded ? `${name}, less the mean of the fits` : name;
  const shown = (value: number, readings: readonly FitReading[]): number => (banded ? value - meanOf(readings) : value);
  const lines = rows[0]!.map(({ name: group }): FigureSeries => ({
    ...drawn, label: group, quantity, unit, role: 'recomputed',
    values: rows.map((readings) => shown(readings.find((reading) => reading.name === group)!.value, readings)),
  }));
  const edge = (which: 0 | 1): readonly number[] => rows.map((readings) => shown(bandOf(readings)[which], readings));
  const band: FigureSeries[] = banded ? [{ ...drawn, label: 'Lowest of the fits', quantity, unit, role: 'band-low', values: edge(0) }, { ...drawn, label: 'Highest of the fits', quantity, unit, role: 'band-high', values: edge(1) }] : [];
  return {
    kind: 'curve',
    title: banded ? `${name} by each published fit, less their mean, at spins ${binary.chi1z} and ${binary.chi2z}` : `${name} by ${lines[0]!.label} at spins ${binary.chi1z} and ${binary.chi2z}`,
    x: { label: 'Mass ratio', unit: '', scale: 'linear', values: x },
    series: [...band, ...lines],
  };
}

