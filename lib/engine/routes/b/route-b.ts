import type { Band, DetectorRoute, MatchOutcome, MatchRequest, ResponseGram, Side } from '../../contract/route';
import type { Response } from '../../contract/settings';
import { channelsOf, normSquared } from './channels';
import { DEFAULT_GOAL, frequencyNodes } from './frequency-panels';
import { frequencySource } from './frequency-source';
import { alignedResidual, bestMatch, climbMass, looksAt } from './best-match';
import { massSights } from './mass-sights';
import { modeGram, type Sight } from './mode-gram';
import { freedomOf } from './moving-side';
import { nodesFor } from './shared-nodes';
import { sightMatcher } from './sight-matcher';
import type { RouteBKnobs, Source } from './spectrum';
import { bestTemplatesByClimbing, type PairSearch } from './template-climb';
import { timeSource } from './time-source';

const DEFAULT_KNOBS: RouteBKnobs = { thinning: 2, quadrature: DEFAULT_GOAL };

const sourceOf = (side: Side, knobs: RouteBKnobs): Source => (side.waveform.domain === 'frequency' ? frequencySource(side) : timeSource(side, knobs));

function gram(side: Side, band: Band, knobs: RouteBKnobs): ResponseGram {
  const source = sourceOf(side, knobs);
  const nodes = nodesFor([source], band, knobs, { power: true });
  const { xRe, xIm, yRe, yIm } = source.line(side.inclinationRad, side.azimuthRad, nodes.f);
  let [xx, yy, xy] = [0, 0, 0];
  for (let i = 0; i < nodes.f.length; i++) {
    const w = 4 * nodes.weight[i]!;
    xx += w * (xRe[i]! * xRe[i]! + xIm[i]! * xIm[i]!);
    yy += w * (yRe[i]! * yRe[i]! + yIm[i]! * yIm[i]!);
    xy += w * (xRe[i]! * yRe[i]! + xIm[i]! * yIm[i]!);
  }
  return { plusPlus: xx, crossCross: yy, plusCross: -xy };
}

/** Several lines of sight: transforms and sums over frequency once, then 2 × 2 forms of the harmonics. */
function grams(side: Side, band: Band, sights: readonly Sight[], knobs: RouteBKnobs): readonly ResponseGram[] {
  if (side.waveform.content.kind !== 'modes') {
    const one = gram(side, band, knobs);
    return sights.map(() => one);
  }
  const source = sourceOf(side, knobs);
  const nodes = nodesFor([source], band, knobs, { allModes: true, power: true });
  return sights.map(modeGram(source.modes(nodes.f), nodes.weight));
}

/** Panels as short as if the amplitude came and went within two cycles of the lower edge: then its power law is smooth on each. */
const CLOSED_FORM_CYCLES = 2;

function closedFormPower(amplitude: (fHz: number) => number, band: Band, goal: number): number {
  const { f, weight } = frequencyNodes(band, band.fHighHz, CLOSED_FORM_CYCLES / band.fLowHz, goal);
  return 4 * f.reduce((sum, at, i) => sum + weight[i]! * amplitude(at) ** 2, 0);
}

function modePower(side: Side, band: Band, knobs: RouteBKnobs): number {
  if (side.waveform.content.kind !== 'modes') return Number.NaN;
  const source = sourceOf(side, knobs);
  const nodes = nodesFor([source], band, knobs, { allModes: true, power: true });
  // |z(f)|² + |z(−f)|² is what the complex channels carry, with prefactor 2.
  return source.modes(nodes.f).reduce((sum, { spectrum }) => sum + normSquared(channelsOf(spectrum, 'complex'), nodes.weight), 0);
}

/** The joint search; a mass beside directions of b comes from power series of pairs of modes, the rest from a search at that mass. */
function joint(request: MatchRequest, source: (side: Side) => Source, knobs: RouteBKnobs): MatchOutcome {
  const { mass, azimuth, inclination } = freedomOf(request);
  const { a, b, band, maximise, rescale } = request;
  const tabled = request.response === 'complex' && mass && (azimuth || inclination) && a.inclinationRad === b.inclinationRad;
  if (!tabled) return bestMatch(request, source, knobs);
  const { match, massFactor, onBound } = massSights({ a, b, band, maximise, inclinationRad: a.inclinationRad }, request, source, knobs).best(a);
  if (massFactor === undefined || !Number.isFinite(match)) return bestMatch(request, source, knobs);
  const held = { ...request, b: rescale(b, massFactor), maximise: maximise.filter((what) => what !== 'templateMass') };
  return { ...bestMatch(held, source, knobs), massFactor, onBound: onBound ?? false };
}

/**
 * Route B: direct Fourier quadrature and residual minimisation.
 * Shape:  see DetectorRoute.
 * Units:  see DetectorRoute.
 * Error:  1e-12 on smooth data with equal steps; as the degree-7 spline (1e-9) otherwise.
 * Fails:  never; no content in the band gives norms of zero, which callers must refuse.
 * Source: settings.md sections 2 to 4; methods named in the files beside this one.
 */
export function routeBWith(changes: Partial<RouteBKnobs>): DetectorRoute {
  const knobs = { ...DEFAULT_KNOBS, ...changes };
  const source = (side: Side): Source => sourceOf(side, knobs);
  const overlap = (a: Side, b: Side, band: Band, response: Response): number => {
    const request = { a, b, band, response, maximise: [], templateMassRange: [1, 1] as const, rescale: (side: Side) => side };
    return bestMatch(request, source, knobs).match;
  };
  const pairs: PairSearch = {
    look: (pair, factors) => looksAt(pair, factors, source, knobs),
    climb: (pair, low, high) => climbMass(pair, low, high, source, knobs),
    whole: (pair) => joint(pair, source, knobs),
  };
  return {
    name: 'B',
    gram: (side, band) => gram(side, band, knobs),
    grams: (side, band, sights) => grams(side, band, sights, knobs),
    sights: (request) => (request.mass === undefined ? sightMatcher(request, source, knobs) : massSights(request, request.mass, source, knobs)),
    powerOf: (amplitude, band) => closedFormPower(amplitude, band, knobs.quadrature),
    modePower: (side, band) => modePower(side, band, knobs),
    overlap,
    match: (request) => joint(request, source, knobs),
    bestTemplates: (signals, request) => bestTemplatesByClimbing(signals, request, pairs),
    residualPower: (request, at) => alignedResidual(request, at, source, knobs),
  };
}

export const routeB: DetectorRoute = routeBWith({});
