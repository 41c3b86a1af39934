import { houseRecoilMass } from '../contract/house-values';
import type { Figure } from '../contract/measurement';
import { C_KM_PER_S } from '../units/constants';
import { energyOnSamples, totalEnergy } from './energy-on-samples';
import { fluxFigure, runningIntegral } from './flux-figure';
import { roundingOfIntegral } from './input-rounding';
import { momentumProducts } from './momentum-products';
import { totalsOnSphere } from './momentum-on-sphere';
import { countedNodes, radiationOnPanels } from './news-on-panels';
import type { PreparedPoint } from './prepare-radiated';
import { negativeModesFinding } from './radiation-findings';
import { house, NO_FLOOR, sampledAs, type Outcome, type RadiationRecipe, type SampledStore, type Turned } from './radiation-recipe';
import { recoilModesFindings } from './recoil-findings';
import { ratesOf, vectorOnSamples, vectorShares, type Vector } from './vector-integrals';

/** Mass of what recoils, in M: the stated one, or M less the energy radiated from startM on. */
const massOf = ({ norm, lessRadiated }: PreparedPoint, energy: number): number => (lessRadiated ? norm - energy : norm);

function outcomeOf(momentum: Vector, mass: number): Outcome {
  // Adding zero takes the sign from a component that vanishes.
  const [vx, vy, vz] = momentum.map((p) => (-p * C_KM_PER_S) / mass + 0) as [number, number, number];
  const directionDeg = (Math.atan2(vy, vx) * 180) / Math.PI;
  return { value: Math.hypot(vx, vy, vz), vector: [vx, vy, vz], components: { vx, vy, vz, inPlane: Math.hypot(vx, vy), directionDeg } };
}

/** A direction within the uncertainty of its own length is none. */
const settle = ({ components }: Outcome, expanded: number): Outcome['components'] => ((components.inPlane ?? 0) > expanded ? components : { ...components, directionDeg: null });

function byRouteA(point: PreparedPoint, store: SampledStore, turned: Turned): Outcome {
  const radiation = sampledAs(store, point, turned);
  const { startM } = point.settings;
  const momentum = vectorOnSamples(momentumProducts(point.record.modes), radiation, startM, turned.order);
  return outcomeOf(momentum, massOf(point, totalEnergy(energyOnSamples(radiation, startM, turned.order))));
}

function byRouteB(point: PreparedPoint): Outcome {
  const { record, settings } = point;
  const { nodes, modes } = radiationOnPanels(record, settings.startM, settings.floor ?? NO_FLOOR, false);
  const { t, w } = countedNodes(nodes);
  const { energy, momentum } = totalsOnSphere(modes.map(({ l, m, news }) => ({ l, m, ...news(t) })), w);
  return outcomeOf(momentum, massOf(point, energy));
}

/** Length of velocity for a length of momentum. */
function kmPerS(point: PreparedPoint, store: SampledStore): number {
  const energy = point.lessRadiated ? totalEnergy(energyOnSamples(sampledAs(store, point, house), point.settings.startM)) : 0;
  return C_KM_PER_S / massOf(point, energy);
}

function rounding(point: PreparedPoint, store: SampledStore, digits: number | null): number {
  const radiation = sampledAs(store, point, house);
  const each = momentumProducts(point.record.modes).map((products) => roundingOfIntegral(products, point.record, radiation, point.settings.startM, digits));
  return kmPerS(point, store) * Math.hypot(...each);
}

function figureOf(point: PreparedPoint, store: SampledStore, name: string): Figure {
  const radiation = sampledAs(store, point, house);
  const { axis } = radiation;
  const { startM } = point.settings;
  const scale = kmPerS(point, store);
  const rates = ratesOf(momentumProducts(point.record.modes), radiation);
  const running = rates.map((rate) => runningIntegral(axis, startM, rate));
  const length = (parts: readonly Float64Array[]): Float64Array => axis.map((_, i) => scale * Math.hypot(...parts.map((part) => part[i]!)));
  return fluxFigure(`Push on ${name} by its radiation and the speed gathered since the start`, axis, startM, { label: 'Push', unit: 'km/s per M', values: length(rates) }, { label: 'Speed since the start', unit: 'km/s', values: length(running) });
}

/** Recoil (Q14). */
export const recoilRecipe: RadiationRecipe = {
  noun: 'recoil',
  article: 'A',
  settings: ['modes', 'lMax', 'startM', 'integrationFloor', 'normaliseBy'],
  normaliseBy: houseRecoilMass,
  withStrain: false,
  couplesEll: true,
  byRouteA,
  byRouteB,
  rounding,
  shares: (point, store) => {
    const scale = kmPerS(point, store);
    return vectorShares(momentumProducts(point.record.modes), sampledAs(store, point, house), point.settings.startM).map(({ l, size }) => ({ l, size: scale * size }));
  },
  settle,
  findings: ({ completed, point }) => [...negativeModesFinding(completed, completed.waveform.name), ...recoilModesFindings(completed, point)],
  figures: (point, store, name) => [figureOf(point, store, name)],
};
