import type { MatchOutcome, MatchRequest, Side } from '../../contract/route';
import { bestShift, nearbyShift, productsOf, readAt, type Reading, type ShiftedPeak } from './best-shift';
import { channelsOf, normSquared, residualSquared, type Channel } from './channels';
import { goldenMaximum, simplexMaximum } from './climb-hill';
import type { FrequencyNodes } from './frequency-panels';
import { freedomOf, movingSide, type Freedom, type Pose, type Posed } from './moving-side';
import { nodesFor } from './shared-nodes';
import type { RouteBKnobs, Source } from './spectrum';

/** Rule 2.7: 24 azimuths, 19 inclinations, masses in steps of 2 %, each then refined to 1e-5. */
const AZIMUTHS = 24;
const INCLINATIONS = 19;
const MASS_RATIO = 1.02;
const REFINED = 1e-5;
/** Starting points of an azimuth search that are refined; hills beyond the third were never the highest. */
const REFINED_STARTS = 3;

interface Search {
  readonly freedom: Freedom;
  readonly reading: Reading;
  readonly a: { readonly source: Source; readonly channels: readonly Channel[]; readonly norm: number };
  readonly posed: Posed;
  readonly nodes: FrequencyNodes;
}

interface Tried {
  readonly pose: Pose;
  readonly match: number;
  readonly peak: ShiftedPeak;
}

type SourceOf = (side: Side) => Source;

function prepare(request: MatchRequest, sourceOf: SourceOf, knobs: RouteBKnobs): Search {
  const { a, b, band, response, templateMassRange, rescale } = request;
  const freedom = freedomOf(request);
  const source = sourceOf(a);
  const factors = freedom.mass ? templateMassRange : [1];
  const extremes = factors.map((factor) => sourceOf(factor === 1 ? b : rescale(b, factor)));
  // A free shift reaches as far as the records overlap at all; what b leaves behind then lies the sum of their lengths away, and must not leak in.
  const apart = Math.max(...extremes.map((other) => (freedom.time ? Math.min(source.spanS, other.spanS) : Math.abs(source.centreS - other.centreS))));
  const allModes = freedom.azimuth || freedom.inclination;
  const nodes = nodesFor([source, ...extremes], band, knobs, { allModes, extraLagS: apart });
  const channels = channelsOf(source.line(a.inclinationRad, a.azimuthRad, nodes.f), response);
  return {
    freedom,
    reading: freedom.turn ? 'modulus' : 'real',
    a: { source, channels, norm: Math.sqrt(normSquared(channels, nodes.weight)) },
    posed: movingSide(b, rescale, response, freedom, nodes.f, sourceOf),
    nodes,
  };
}

/**
 * The match at one pose of b, with its best shift when time is free: from everywhere, or the hill
 * that `near` stands on. Shifts count from the records' centres.
 */
function tryPose(search: Search, pose: Pose, near?: number): Tried {
  const { source, channels } = search.posed(pose);
  const { f, weight } = search.nodes;
  const products = productsOf(search.a.channels, channels, weight);
  const reach = (search.a.source.spanS + source.spanS) / 2;
  const fixed = source.centreS - search.a.source.centreS;
  const free = (): ShiftedPeak => (near === undefined ? bestShift(products, f, reach, search.reading) : nearbyShift(products, f, near, search.reading));
  const peak = search.freedom.time ? free() : readAt(products, f, fixed, search.reading);
  return { pose, match: peak.value / (search.a.norm * Math.sqrt(normSquared(channels, weight))), peak };
}

const evenly = (low: number, high: number, n: number): number[] => Array.from({ length: n }, (_, i) => low + ((high - low) * i) / (n - 1));

function startingPoses(request: MatchRequest, freedom: Freedom): Pose[] {
  const { b, templateMassRange: range } = request;
  const ratios = freedom.mass ? Math.max(2, 1 + Math.ceil(Math.log(range[1] / range[0]) / Math.log(MASS_RATIO))) : 1;
  const masses = freedom.mass ? evenly(Math.log(range[0]), Math.log(range[1]), ratios).map(Math.exp) : [1];
  const inclinations = freedom.inclination ? evenly(0, Math.PI, INCLINATIONS) : [b.inclinationRad];
  const azimuths = freedom.azimuth ? Array.from({ length: AZIMUTHS }, (_, i) => b.azimuthRad + (2 * Math.PI * i) / AZIMUTHS) : [b.azimuthRad];
  return masses.flatMap((massFactor) =>
    inclinations.flatMap((inclinationRad) => azimuths.map((azimuthRad) => ({ massFactor, inclinationRad, azimuthRad }))),
  );
}

/** A variable of the refinement: how a pose holds it, its grid step and its bounds. */
interface Variable {
  readonly get: (pose: Pose) => number;
  readonly set: (pose: Pose, x: number) => Pose;
  readonly step: number;
  readonly low: number;
  readonly high: number;
}

function variablesOf(request: MatchRequest, freedom: Freedom): Variable[] {
  const [low, high] = request.templateMassRange.map(Math.log) as [number, number];
  const list: Variable[] = [];
  if (freedom.mass) list.push({ get: (p) => Math.log(p.massFactor), set: (p, x) => ({ ...p, massFactor: Math.exp(x) }), step: Math.log(MASS_RATIO), low, high });
  if (freedom.inclination) list.push({ get: (p) => p.inclinationRad, set: (p, x) => ({ ...p, inclinationRad: x }), step: Math.PI / (INCLINATIONS - 1), low: 0, high: Math.PI });
  if (freedom.azimuth) list.push({ get: (p) => p.azimuthRad, set: (p, x) => ({ ...p, azimuthRad: x }), step: (2 * Math.PI) / AZIMUTHS, low: -Infinity, high: Infinity });
  return list;
}

function refine(search: Search, start: Tried, variables: readonly Variable[]): Tried {
  const poseAt = (x: readonly number[]): Pose => variables.reduce((pose, variable, i) => variable.set(pose, x[i]!), start.pose);
  // A mass stretches b's whole time axis, so its shift is sought anew; a turn hardly moves it.
  const near = search.freedom.mass ? undefined : start.peak.shiftS;
  const value = (x: readonly number[]): number => tryPose(search, poseAt(x), near).match;
  const clamp = (x: number, v: Variable): number => Math.min(Math.max(x, v.low), v.high);
  const from = variables.map((v) => v.get(start.pose));
  const [only] = variables;
  const summit =
    variables.length === 1 && only
      ? goldenMaximum((x) => value([x]), clamp(from[0]! - only.step, only), clamp(from[0]! + only.step, only), REFINED)
      : simplexMaximum(value, from, variables.map((v, i) => (from[i]! + v.step / 2 > v.high ? -v.step / 2 : v.step / 2)), (x) => x.map((xi, i) => clamp(xi, variables[i]!)), REFINED);
  const refined = tryPose(search, poseAt(summit.x));
  return refined.match > start.match ? refined : start;
}

function searchPoses(request: MatchRequest, search: Search): Tried {
  const variables = variablesOf(request, search.freedom);
  const { nearShiftS } = request;
  const known = nearShiftS === undefined ? undefined : nearShiftS - search.a.source.centreS + search.posed(startingPoses(request, search.freedom)[0]!).source.centreS;
  const tried = startingPoses(request, search.freedom).map((pose) => tryPose(search, pose, known));
  const ranked = [...tried].sort((p, q) => q.match - p.match);
  if (variables.length === 0) return ranked[0]!;
  // A lone azimuth is a ring: its hills are the starting points above both neighbours.
  const ring = search.freedom.azimuth && variables.length === 1;
  const isHill = (i: number): boolean => tried[i]!.match >= tried.at(i - 1)!.match && tried[i]!.match >= tried[(i + 1) % tried.length]!.match;
  const starts = ring ? ranked.filter((t) => isHill(tried.indexOf(t))).slice(0, REFINED_STARTS) : ranked.slice(0, 1);
  return starts.map((start) => refine(search, start, variables)).reduce((best, next) => (next.match > best.match ? next : best));
}

const wrapped = (angle: number): number => angle - 2 * Math.PI * Math.ceil((angle - Math.PI) / (2 * Math.PI));

/** The free turn under the contract's names: an advance of b's phase, a change of its azimuth, or a polarisation angle. */
function turnsOf(request: MatchRequest, best: Tried): Pick<MatchOutcome, 'phaseShiftRad' | 'polarisationRad'> {
  const { turnRad } = best.peak;
  // A real response at f > 0 holds e^{+iφ}, the complex z = h₊ − ih× holds e^{−iφ}.
  if (request.response !== 'complex') return { phaseShiftRad: wrapped(turnRad) };
  const polarisation = request.maximise.includes('polarisation') ? { polarisationRad: turnRad / 2 } : {};
  if (request.b.waveform.content.kind === 'modes') return { phaseShiftRad: wrapped(best.pose.azimuthRad - request.b.azimuthRad), ...polarisation };
  return request.maximise.includes('phase') ? { phaseShiftRad: wrapped(-turnRad) } : { phaseShiftRad: 0, ...polarisation };
}

/**
 * The match of rule 2.7 by search over poses and shifts of b, with the mismatch as ½‖â − b̂‖² there.
 * Shape:  see MatchRequest and MatchOutcome.
 * Units:  dimensionless; shift in s, angles in rad.
 * Error:  shifts to rounding; poses to 1e-5, which enters the match squared.
 * Fails:  never; a side without content gives NaN, which callers refuse.
 * Source: settings.md rule 2.7; definitions Q01–Q03.
 */
export function bestMatch(request: MatchRequest, sourceOf: SourceOf, knobs: RouteBKnobs): MatchOutcome {
  const search = prepare(request, sourceOf, knobs);
  return outcomeOf(request, search, searchPoses(request, search));
}

/** Looks need the hills only. */
const LOOK_GOAL = 1e-6;

/** The matches at a few factors on b's mass, on fewer nodes. */
export function looksAt(request: MatchRequest, factors: readonly number[], sourceOf: SourceOf, knobs: RouteBKnobs): number[] {
  const search = prepare(request, sourceOf, { ...knobs, quadrature: LOOK_GOAL });
  const { inclinationRad, azimuthRad } = request.b;
  return factors.map((massFactor) => tryPose(search, { massFactor, inclinationRad, azimuthRad }).match);
}

/** The top of the hill between two factors on b's mass. */
export function climbMass(request: MatchRequest, low: number, high: number, sourceOf: SourceOf, knobs: RouteBKnobs): MatchOutcome {
  const search = prepare(request, sourceOf, knobs);
  const { inclinationRad, azimuthRad } = request.b;
  const poseAt = (x: number): Pose => ({ massFactor: Math.min(high, Math.max(low, Math.exp(x))), inclinationRad, azimuthRad });
  const summit = goldenMaximum((x) => tryPose(search, poseAt(x)).match, Math.log(low), Math.log(high), REFINED);
  return outcomeOf(request, search, tryPose(search, poseAt(summit.x[0]!)));
}

function outcomeOf(request: MatchRequest, search: Search, best: Tried): MatchOutcome {
  const { source, channels } = search.posed(best.pose);
  const { f, weight } = search.nodes;
  const normB = Math.sqrt(normSquared(channels, weight));
  const mismatch = residualSquared(search.a.channels, search.a.norm, channels, normB, f, weight, best.peak) / 2;
  const { freedom } = search;
  const timeShiftS = freedom.time ? best.peak.shiftS + search.a.source.centreS - source.centreS : 0;
  // Below ½ the residual is the sharper of the two and keeps the match at most 1.
  const match = mismatch < 0.5 ? 1 - mismatch : best.match;
  const outcome: MatchOutcome = { match, mismatch, timeShiftS, ...turnsOf(request, best) };
  const [low, high] = request.templateMassRange;
  return {
    ...outcome,
    ...(freedom.inclination ? { inclinationRad: best.pose.inclinationRad } : {}),
    ...(freedom.mass ? { massFactor: best.pose.massFactor, onBound: best.pose.massFactor < low * (1 + 2 * REFINED) || best.pose.massFactor > high * (1 - 2 * REFINED) } : {}),
  };
}

/** ‖a − b‖² with actual amplitudes and b moved as `at` says; the free turn is the best one there. */
export function alignedResidual(request: MatchRequest, at: MatchOutcome, sourceOf: SourceOf, knobs: RouteBKnobs): number {
  const { freedom, reading, a, posed, nodes } = prepare({ ...request, templateMassRange: [at.massFactor ?? 1, at.massFactor ?? 1] }, sourceOf, knobs);
  const { b } = request;
  const pose: Pose = {
    massFactor: at.massFactor ?? 1,
    inclinationRad: at.inclinationRad ?? b.inclinationRad,
    azimuthRad: b.azimuthRad + (freedom.azimuth ? at.phaseShiftRad : 0),
  };
  const { source, channels } = posed(pose);
  const shiftS = at.timeShiftS - a.source.centreS + source.centreS;
  const { turnRad } = readAt(productsOf(a.channels, channels, nodes.weight), nodes.f, shiftS, reading);
  return residualSquared(a.channels, 1, channels, 1, nodes.f, nodes.weight, { shiftS, turnRad });
}
