import type { RadiationRecord } from './radiation-record';
import { energyBefore } from './energy-before';
import { energyOnPanels } from './energy-on-panels';
import { energyOnSamples, ENERGY_FACTOR, totalEnergy, type ModeEnergy } from './energy-on-samples';
import type { EnergySettings } from './energy-settings';
import { fluxOnSamples, houseSamples, type Fluxes, type SampleNumerics } from './flux-on-samples';
import { quadratureWeights } from './local-calculus';

/** The same route with every knob turned down: how far the number moves is its own error bar. */
const coarserSamples: SampleNumerics = { stencil: 9, interpolation: 6, refinements: 0 };

export interface EnergyAtPoint {
  readonly modes: readonly ModeEnergy[];
  readonly before: number;
  /** Sum and what was added, as fractions of M, before the normaliser. */
  readonly energy: number;
}

/** Standard uncertainties of the computation, as fractions of M. */
export interface ComputationUncertainty {
  readonly quadrature: number;
  readonly stencil: number;
  /** Zero for binary doubles: nothing was printed. */
  readonly rounding: number;
}

/** Fluxes that do not depend on the start are kept between the points of a sweep. */
export interface FluxStore {
  readonly fine: (record: RadiationRecord, floor: number | null) => Fluxes;
  readonly coarse: (record: RadiationRecord, floor: number | null) => Fluxes;
}

/** A floor that strain and news never use. */
const NO_FLOOR = 1;

/** The last fluxes of each kind: a sweep over the start, or U beside the value, asks for the same ones again. */
export function fluxStore(): FluxStore {
  const keep = (numerics: SampleNumerics) => {
    let last: { record: RadiationRecord; floor: number | null; fluxes: Fluxes } | null = null;
    return (record: RadiationRecord, floor: number | null): Fluxes => {
      if (last === null || last.record !== record || last.floor !== floor) last = { record, floor, fluxes: fluxOnSamples(record, floor ?? NO_FLOOR, numerics) };
      return last.fluxes;
    };
  };
  return { fine: keep(houseSamples), coarse: keep(coarserSamples) };
}

const add = (record: RadiationRecord, modes: readonly ModeEnergy[], settings: EnergySettings, route: 'A' | 'B'): EnergyAtPoint | null => {
  const before = settings.binary === null ? (settings.rule === false ? 0 : null) : energyBefore(record, settings.startM, settings.rule, settings.binary, route);
  return before === null ? null : { modes, before, energy: totalEnergy(modes) + before };
};

/** Route A at one point; null when what should be added cannot be computed. */
export const energyByRouteA = (record: RadiationRecord, settings: EnergySettings, store: FluxStore): EnergyAtPoint | null =>
  add(record, energyOnSamples(store.fine(record, settings.floor), settings.startM), settings, 'A');

/** Route B at one point. */
export const energyByRouteB = (record: RadiationRecord, settings: EnergySettings): EnergyAtPoint | null =>
  add(record, energyOnPanels(record, settings.startM, settings.floor ?? NO_FLOOR), settings, 'B');

/**
 * Rounded samples: each is off by up to half a unit of its last printed digit. Differences carry that
 * into Ḣ with the stencil's own gain, independently from sample to sample; integrals and news carry
 * it as a common relative error, which bounds it from above.
 */
function roundingOf(record: RadiationRecord, fluxes: Fluxes, startM: number, digits: number | null, total: number): number {
  if (digits === null) return 0;
  const relative = (0.5 * 10 ** (1 - digits)) / Math.sqrt(3);
  const { noiseGain } = fluxes;
  if (noiseGain === null) return 2 * relative * total;
  const weights = quadratureWeights(fluxes.axis, startM, 8, fluxes.isEven);
  let [variance, bias] = [0, 0];
  record.modes.forEach(({ re, im }, k) => {
    const power = fluxes.perMode[k]!.power;
    for (let i = 0; i < weights.length; i++) {
      const slip = relative * Math.hypot(re[i]!, im[i]!) * noiseGain[i]!;
      const each = ENERGY_FACTOR * weights[i]!;
      variance += 4 * each * each * power[i]! * slip * slip;
      bias += Math.abs(each) * 2 * slip * slip;
    }
  });
  return Math.sqrt(variance) + bias;
}

/** Relative size below which no computation in double precision is trusted (engine design). */
const LEAST = 1e-13;

/**
 * How far route A moves when each of its knobs is turned, as standard uncertainties (half-widths over √3).
 * Shape:  one number a component.
 * Units:  fractions of M.
 * Error:  the stencil's is that of the shorter one, so it errs on the large side.
 * Fails:  never.
 * Source: settings.md rule 12; domain reference section 5.
 */
export function computationUncertainty(record: RadiationRecord, settings: EnergySettings, store: FluxStore, digits: number | null): ComputationUncertainty {
  const { floor } = settings;
  const fine = store.fine(record, floor);
  const total = totalEnergy(energyOnSamples(fine, settings.startM));
  const moved = (fluxes: Fluxes, order: 6 | 8): number => Math.abs(totalEnergy(energyOnSamples(fluxes, settings.startM, order)) - total) / Math.sqrt(3);
  const least = LEAST * Math.abs(total);
  return {
    quadrature: Math.max(moved(fine, 6), least),
    stencil: record.variable === 'news' ? 0 : Math.max(moved(store.coarse(record, floor), 8), least),
    rounding: roundingOf(record, fine, settings.startM, digits, total),
  };
}

export const combinedU = ({ quadrature, stencil, rounding }: ComputationUncertainty): number => 2 * Math.hypot(quadrature, stencil, rounding);
