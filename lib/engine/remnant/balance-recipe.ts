import { ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import { angularMomentumOnPanels } from '../radiation/angular-momentum-recipe';
import { energyOnPanels } from '../radiation/energy-on-panels';
import { ENERGY_FACTOR, energyOnSamples, totalEnergy } from '../radiation/energy-on-samples';
import { sharesByEll } from '../radiation/energy-recipe';
import { energyFlux, fluxFigure, runningIntegral } from '../radiation/flux-figure';
import { roundingOfIntegral } from '../radiation/input-rounding';
import { angularMomentumProducts } from '../radiation/momentum-products';
import type { PreparedPoint } from '../radiation/prepare-radiated';
import { missingModesFindings, negativeModesFinding } from '../radiation/radiation-findings';
import { house, NO_FLOOR, sampledAs, type Outcome, type RadiationRecipe, type SampledStore, type Turned } from '../radiation/radiation-recipe';
import type { RadiationRecord } from '../radiation/radiation-record';
import { listedButMissing, restrictsModes } from '../radiation/used-modes';
import { ratesOf, vectorOnSamples, vectorShares } from '../radiation/vector-integrals';
import { stop } from '../tones/measure-tones';
import type { RemnantMethod } from './balance-method';
import { balanceFindings } from './balance-findings';
import { ringdownCheck } from './ringdown-check';
import { postNewtonianStart, roundingOfX, startX, statedStart, type Order, type StartValues } from './start-values';

export type RemnantNumber = 'mass' | 'spin';

/** What one route says of energy and angular momentum from the start on. */
interface Radiated {
  readonly energy: number;
  /** Zero where it is not asked for. */
  readonly momentum: number;
}

/** Everything that a balance rests on besides the radiation of its modes. */
export interface Balance {
  readonly which: RemnantNumber;
  readonly method: Exclude<RemnantMethod, 'ringdown'>;
  readonly request: MeasureRequest;
  /** All modes of the file, whatever modes the claim then sums over. */
  readonly whole: RadiationRecord;
  /** Spins that nobody states count as none. */
  readonly spinAssumed: Readonly<Record<'chi1z' | 'chi2z', boolean>>;
}

/** The start by one route; null where the record gives no frequency, or the sheet no mass ratio. */
export function startOf({ method, request, whole }: Balance, { settings }: PreparedPoint, route: 'A' | 'B', order: Order = 2): StartValues | null {
  if (method === 'balance-adm') return statedStart(request.inputs.of.a!.binary);
  const x = startX(whole, settings.startM, route);
  return x === null || settings.binary === null ? null : postNewtonianStart(settings.binary, x, order);
}

function radiatedOnSamples({ which }: Balance, point: PreparedPoint, store: SampledStore, turned: Turned): Radiated {
  const radiation = sampledAs(store, point, turned);
  const { startM } = point.settings;
  const energy = totalEnergy(energyOnSamples(radiation, startM, turned.order));
  return { energy, momentum: which === 'mass' ? 0 : vectorOnSamples(angularMomentumProducts(point.record.modes), radiation, startM, turned.order)[2] };
}

function radiatedOnPanels({ which }: Balance, point: PreparedPoint): Radiated {
  const { record, settings } = point;
  const energy = totalEnergy(energyOnPanels(record, settings.startM, settings.floor ?? NO_FLOOR));
  return { energy, momentum: which === 'mass' ? 0 : angularMomentumOnPanels(point)[2] };
}

function outcomeOf({ which }: Balance, start: StartValues | null, { energy, momentum }: Radiated, checkRingdown: number | null): Outcome | null {
  if (start === null) return null;
  const mass = start.mass - energy;
  const spin = (start.momentum - momentum) / mass ** 2;
  const value = which === 'mass' ? mass : spin;
  if (!Number.isFinite(value)) return null;
  const components = which === 'mass' ? { start: start.mass, radiated: energy, checkRingdown } : { start: start.momentum, radiated: momentum, checkRingdown };
  return { value, vector: [value], components };
}

function rounding(balance: Balance, point: PreparedPoint, store: SampledStore, digits: number | null, { value }: Outcome): number {
  const radiation = sampledAs(store, point, house);
  const { startM, binary } = point.settings;
  const { record } = point;
  const energyProducts = record.modes.map((_, i) => ({ a: i, b: i, re: ENERGY_FACTOR, im: 0 }));
  const ofEnergy = roundingOfIntegral(energyProducts, record, { ...radiation, strain: null }, startM, digits);
  const x = balance.method === 'balance-pn' ? startX(balance.whole, startM, 'A') : null;
  const slip = x === null ? 0 : roundingOfX(balance.whole, startM, 2 * x ** 1.5, digits);
  const moved = x === null || binary === null ? { mass: 0, momentum: 0 } : difference(postNewtonianStart(binary, x * (1 + slip)), postNewtonianStart(binary, x));
  if (balance.which === 'mass') return Math.hypot(ofEnergy, moved.mass);
  const ofMomentum = roundingOfIntegral(angularMomentumProducts(record.modes)[2], record, radiation, startM, digits);
  const mass = startOf(balance, point, 'A')!.mass - totalEnergy(energyOnSamples(radiation, startM));
  return Math.hypot(ofMomentum / mass ** 2, moved.momentum / mass ** 2, (2 * value * Math.hypot(ofEnergy, moved.mass)) / mass);
}

const difference = (p: StartValues, q: StartValues): StartValues => ({ mass: p.mass - q.mass, momentum: p.momentum - q.momentum });

/** E11: the start values by one order less. */
function orderLine(balance: Balance, point: PreparedPoint, store: SampledStore): BudgetLine[] {
  if (balance.method === 'balance-adm') return [];
  const radiated = radiatedOnSamples(balance, point, store, house);
  const [full, less] = ([2, 1] as const).map((order) => outcomeOf(balance, startOf(balance, point, 'A', order), radiated, null)?.value ?? Number.NaN) as [number, number];
  return [{ component: 'Post-Newtonian start', id: 'E11', group: 'coverage', u: Math.abs(full - less) / ROOT3, note: 'Start values with and without their last term; half-width over √3. Spin–orbit terms are left out.' }];
}

/** Flux, and what is left of mass or angular momentum. */
function figureOf(balance: Balance, point: PreparedPoint, store: SampledStore, name: string): Figure[] {
  const radiation = sampledAs(store, point, house);
  const { axis } = radiation;
  const { startM } = point.settings;
  const start = startOf(balance, point, 'A');
  if (start === null) return [];
  const left = (begin: number, flux: Float64Array): Float64Array => runningIntegral(axis, startM, flux).map((gone) => begin - gone);
  if (balance.which === 'mass') {
    const flux = energyFlux(radiation);
    return [fluxFigure(`Energy flux of ${name} and the mass that is left`, axis, startM, { label: 'Flux', unit: 'c⁵/G', values: flux }, { label: 'Mass that is left', unit: 'M', values: left(start.mass, flux) })];
  }
  const flux = ratesOf(angularMomentumProducts(point.record.modes), radiation)[2]!;
  return [fluxFigure(`Flux of angular momentum of ${name} and what is left of it`, axis, startM, { label: 'Flux', unit: 'M', values: flux }, { label: 'Angular momentum that is left', unit: 'M²', values: left(start.momentum, flux) })];
}

const noNumber = ({ method }: Balance) => (name: string): Finding =>
  method === 'balance-adm'
    ? stop('engine/start-missing', name, `The balance begins with the initial energy and angular momentum, of which ${name} does not state both that it needs.`, 'State binary.admEnergy and, for the spin, binary.admAngularMomentum, or declare method: balance-pn.')
    : stop('engine/modes-missing', name, `The balance begins with a post-Newtonian orbit, but ${name} has no (2,2) mode, or fewer than three samples of it after the start, from which to read its frequency.`, 'Supply the (2,2) mode, state binary.admEnergy, or declare method: ringdown.');

/**
 * Mass or spin of the remnant by balance, as one of the family of what is radiated (Q16).
 * Shape:  one recipe a claim.
 * Units:  mass in M; spin dimensionless.
 * Error:  that of energy and angular momentum, carried over.
 * Fails:  as the family; without start values.
 * Source: settings.md section 5; domain reference, Q16.
 */
export function balanceRecipe(balance: Balance): RadiationRecipe {
  const { which, method, request } = balance;
  const check = ringdownCheck(balance);
  const recipe: RadiationRecipe = {
    noun: which,
    article: 'A',
    settings: ['modes', 'lMax', 'startM', 'integrationFloor'],
    normaliseBy: 'M',
    withStrain: which === 'spin',
    byRouteA: (point, store, turned) => outcomeOf(balance, startOf(balance, point, 'A'), radiatedOnSamples(balance, point, store, turned), turned === house ? check(point) : null),
    byRouteB: (point) => outcomeOf(balance, startOf(balance, point, 'B'), radiatedOnPanels(balance, point), null),
    rounding: (point, store, digits, outcome) => rounding(balance, point, store, digits, outcome),
    shares: (point, store, { value }) => {
      const radiation = sampledAs(store, point, house);
      const { startM } = point.settings;
      if (which === 'mass') return sharesByEll(energyOnSamples(radiation, startM), 1);
      const mass = startOf(balance, point, 'A')!.mass - totalEnergy(energyOnSamples(radiation, startM));
      return Number.isFinite(value) ? vectorShares([[], [], angularMomentumProducts(point.record.modes)[2]], radiation, startM).map(({ l, size }) => ({ l, size: size / mass ** 2 })) : [];
    },
    rows: ({ settings: { binary } }) => [
      { name: 'method', value: method, matters: true },
      ...(request.settings.window === undefined ? [] : [{ name: 'window', value: request.settings.window, unit: 'M', matters: false } as const]),
      ...(method === 'balance-pn' && binary !== null ? [{ name: 'massRatio', value: binary.massRatio, matters: false } as const] : []),
      ...(method === 'balance-pn' && binary !== null && which === 'spin' ? (['chi1z', 'chi2z'] as const).map((name) => ({ name, value: binary[name], matters: balance.spinAssumed[name] })) : []),
    ],
    coverage: (point, store) => orderLine(balance, point, store),
    noNumber: noNumber(balance),
    findings: (context) => [
      ...negativeModesFinding(context.completed, context.completed.waveform.name, '; without them what is radiated would be half'),
      ...missingModesFindings(context.completed, listedButMissing(context.completed, context.point), restrictsModes(context.point), which === 'mass' ? 'energy' : 'angular momentum', 'Higher modes carry some of it too.'),
      ...balanceFindings(balance, recipe, context),
    ],
    figures: (point, store, name) => figureOf(balance, point, store, name),
  };
  return recipe;
}
