import type { CompletedModes } from '../conditioning/complete-modes';
import { completeModes } from '../conditioning/complete-modes';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import { energyRecipe } from '../radiation/energy-recipe';
import { preparerOf, type PreparedPoint } from '../radiation/prepare-radiated';
import { computationUncertainty, type ComputationUncertainty } from '../radiation/radiation-budget';
import { house, sampledStore, type Outcome, type SampledStore } from '../radiation/radiation-recipe';
import { isFinding, stop, type At } from '../tones/measure-tones';
import { emPreparer, type EmPoint } from './em-point';

/** What the other file radiates in gravitational waves, as `radiated-energy` has it. */
export interface GwEnergy {
  readonly completed: CompletedModes;
  readonly point: PreparedPoint;
  readonly store: SampledStore;
  readonly outcome: Outcome;
  /** By route B; computed when first asked for. */
  readonly byRouteB: () => number;
  readonly uncertainty: () => ComputationUncertainty;
}

export interface RatioPoint {
  readonly em: EmPoint;
  readonly gw: GwEnergy;
}

function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null;
  return () => (made ??= { value: make() }).value;
}

/** Where both integrals begin, and the floor; field and mass mean nothing to the gravitational one. */
const ofWaves = ({ startM, integrationFloor }: DeclaredSettings): DeclaredSettings => ({ ...(startM === undefined ? {} : { startM }), ...(integrationFloor === undefined ? {} : { integrationFloor }) });

function gwEnergy(request: MeasureRequest): GwEnergy | Finding {
  const { gw } = request.inputs.of;
  if (gw === undefined) return stop('engine/no-signal', request.claimId, 'The claim names no gravitational waveform.', 'Name one as "gw" in `of`.');
  const completed = completeModes(gw);
  const point = preparerOf(completed.waveform, { ...request, settings: ofWaves(request.settings), over: null }, energyRecipe)({});
  if (isFinding(point)) return point;
  const store = sampledStore(energyRecipe.withStrain);
  const outcome = energyRecipe.byRouteA(point, store, house)!;
  const digits = gw.significantDigits;
  return {
    completed, point, store, outcome,
    byRouteB: once(() => energyRecipe.byRouteB(point)?.value ?? Number.NaN),
    uncertainty: once(() => computationUncertainty({ recipe: energyRecipe, point, store, digits }, outcome)),
  };
}

/** Both energies at each point of a sweep; each file is read once. */
export function ratioPreparer(request: MeasureRequest): (at: At) => RatioPoint | Finding {
  const { em } = request.inputs.of;
  if (em === undefined) return () => stop('engine/no-signal', request.claimId, 'The claim names no electromagnetic waveform.', 'Name one as "em" in `of`.');
  const prepare = emPreparer(em, request.settings);
  const gw = gwEnergy(request);
  return (at) => {
    const point = prepare(at);
    if (isFinding(point)) return point;
    return isFinding(gw) ? gw : { em: point, gw };
  };
}
