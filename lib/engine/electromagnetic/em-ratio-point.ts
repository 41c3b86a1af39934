import { completeModes, type CompletedModes } from '../conditioning/complete-modes';
import type { Finding } from '../contract/finding';
import type { BudgetLine } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import { energyRecipe } from '../radiation/energy-recipe';
import { preparerOf, type PreparedPoint } from '../radiation/prepare-radiated';
import { radiationBudget } from '../radiation/radiation-budget';
import { house, sampledStore, type Outcome, type SampledStore } from '../radiation/radiation-recipe';
import { isFinding, stop, type At } from '../tones/measure-tones';
import { emPreparer, once, type EmPoint } from './em-point';

/** What the other file radiates in gravitational waves, as `radiated-energy` has it. */
export interface GwEnergy {
  readonly completed: CompletedModes;
  readonly point: PreparedPoint;
  readonly store: SampledStore;
  readonly outcome: Outcome;
  /** By route B; computed when first asked for. */
  readonly byRouteB: () => number;
  /** The same at every field; computed when first asked for. */
  readonly budget: () => readonly BudgetLine[];
}

export interface RatioPoint {
  readonly em: EmPoint;
  readonly gw: GwEnergy;
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
    budget: once(() => radiationBudget({ recipe: energyRecipe, point, store, digits }, outcome)),
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
