import type { Band, BestTemplate, DetectorRoute, MatchOutcome, MatchRequest, ResponseGram, Side, TemplateRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { residualSum, shiftS, xOfShift, type Pair } from './alignment';
import { bestByPairs, bestPlaces, isScannable, pairRequest } from './best-templates';
import { channelsOf, power, realResponse } from './cross-spectrum';
import { JointSearch, searchedIn, type Placement } from './joint-search';
import { massSights } from './mass-sights';
import { lineSpectrum, modeBank } from './mode-bank';
import { piecesOf, type Piece } from './file-pieces';
import { houseNumerics, type Numerics } from './numerics';
import { prepare, type Prepared } from './prepare';
import type { Content } from './side-spectra';
import type { Spectrum } from './spectrum';
import type { SweptAlignment } from './pair-sweep';
import { sightMatcher } from './sight-matcher';
import { closedFormPower } from './closed-form-power';
import { SpectrumStore } from './spectrum-store';
import { sweepStep } from './sweep-memory';
import type { BinWeights } from './bin-weights';

const strainScale = (side: Side): number => side.strainPerUnit * side.secondsPerUnit;

const preparePiece = ({ side, band, longestS }: Piece, store: SpectrumStore, numerics: Numerics, contents?: readonly Content[]): Prepared =>
  prepare({ sides: [side], band, absoluteTimes: false, ...(longestS === undefined ? {} : { longestS }) }, store, numerics, contents);

const sumOf = (grams: readonly ResponseGram[]): ResponseGram =>
  grams.reduce((p, q) => ({ plusPlus: p.plusPlus + q.plusPlus, crossCross: p.crossCross + q.crossCross, plusCross: p.plusCross + q.plusCross }));

function gramOf(s: Spectrum, weights: BinWeights, scale: number): ResponseGram {
  const plus = realResponse(s, 'plus');
  const cross = realResponse(s, 'cross');
  const factor = 4 * weights.dfHz * scale * scale;
  let mixed = 0;
  for (let j = 0; j < weights.values.length; j++) {
    const k = weights.first + j;
    mixed += weights.values[j]! * (plus.re[k]! * cross.re[k]! + plus.im[k]! * cross.im[k]!);
  }
  return { plusPlus: factor * power(plus, weights), crossCross: factor * power(cross, weights), plusCross: factor * mixed };
}

/** ‖·‖² without 4 df (real) or 2 df (both polarisations). */
function normOf(s: Spectrum, response: Response, weights: BinWeights): number {
  const { plus, minus } = channelsOf(s, response);
  return power(plus, weights) + (minus === null ? 0 : power(minus, weights));
}

/** Into (−π, π]. */
const wrapped = (rad: number): number => rad - 2 * Math.PI * Math.ceil(rad / (2 * Math.PI) - 0.5);

/** Turn of the cross spectrum, as the phase and polarisation that the contract names. */
function turnsOf(request: MatchRequest, placement: Placement, turnRad: number): Pick<MatchOutcome, 'phaseShiftRad' | 'polarisationRad'> {
  const polarisation = request.maximise.includes('polarisation');
  if (request.response !== 'complex') return { phaseShiftRad: turnRad };
  const modes = request.b.waveform.content.kind === 'modes';
  if (modes) return { phaseShiftRad: wrapped(placement.azimuthShiftRad), ...(polarisation ? { polarisationRad: turnRad / 2 } : {}) };
  // h ∝ e^{−iφ}: rotating h₊ − ih× by +α delays the wave's phase by α.
  return request.maximise.includes('phase') ? { phaseShiftRad: -turnRad } : { phaseShiftRad: 0, polarisationRad: turnRad / 2 };
}

/** The inverse of `turnsOf`. */
function turnAt(request: MatchRequest, at: MatchOutcome): number {
  if (request.response !== 'complex') return at.phaseShiftRad;
  if (request.b.waveform.content.kind === 'modes') return 2 * (at.polarisationRad ?? 0);
  return request.maximise.includes('phase') ? -at.phaseShiftRad : 2 * (at.polarisationRad ?? 0);
}

/** A mass beside directions of b: hundreds of directions at every mass are read off tables of products of modes. */
const isTabled = (request: MatchRequest): boolean => {
  const { mass, azimuth, inclination } = searchedIn(request);
  return request.response === 'complex' && mass && (azimuth || inclination) && request.a.inclinationRad === request.b.inclinationRad;
};

/** The mass from the tables; shift, turn and directions from a search at that mass. Null where the tables see nothing. */
function tabledOutcome(request: MatchRequest, store: SpectrumStore, numerics: Numerics): MatchOutcome | null {
  const { a, b, band, maximise, rescale } = request;
  const sights = massSights({ a, b, band, maximise, inclinationRad: a.inclinationRad }, request, store, numerics);
  const { match, massFactor, onBound } = sights.best(a);
  if (massFactor === undefined || !Number.isFinite(match)) return null;
  const held = { ...request, b: rescale(b, massFactor), maximise: maximise.filter((what) => what !== 'templateMass') };
  return { ...searchedOutcome(held, null, store, numerics), massFactor, onBound: onBound ?? false };
}

/** A template whose mass alone is searched for is a bank of one. */
function outcomeOf(request: MatchRequest, store: SpectrumStore, numerics: Numerics): MatchOutcome {
  if (isTabled(request)) return tabledOutcome(request, store, numerics) ?? searchedOutcome(request, null, store, numerics);
  const { a, b, ...shared } = request;
  const bank = { ...shared, templates: [b] };
  if (!request.maximise.includes('templateMass') || !isScannable([a], bank)) return searchedOutcome(request, null, store, numerics);
  return searchedOutcome(request, bestPlaces([a], bank, { store, numerics })[0]!.massFactor, store, numerics);
}

function bestTemplates(signals: readonly Side[], request: TemplateRequest, store: SpectrumStore, numerics: Numerics): BestTemplate[] {
  const searches = request.templates.length > 1 || request.maximise.includes('templateMass');
  if (!searches || !isScannable(signals, request)) return bestByPairs(signals, request, (pair) => (isTabled(pair) ? outcomeOf(pair, store, numerics) : searchedOutcome(pair, null, store, numerics)));
  return bestPlaces(signals, request, { store, numerics }).map(({ index, massFactor }, s) => ({
    index,
    outcome: searchedOutcome(pairRequest(request, signals[s]!, index), massFactor, store, numerics),
  }));
}

/** The joint search, or its outcome at a factor on b's mass that is known already. */
function searchedOutcome(request: MatchRequest, massFactor: number | null, store: SpectrumStore, numerics: Numerics): MatchOutcome {
  const searched = searchedIn(request);
  const step = massFactor === null ? sweepStep(request, store, numerics) : null;
  if (step?.swept) return sweptOutcome(request, step.swept);
  const search = new JointSearch(request, searched, store, numerics);
  const { pair, alignment, placement, onBound } = massFactor === null ? search.run() : search.at({ massFactor, inclinationRad: request.b.inclinationRad, azimuthShiftRad: 0 });
  step?.remember({ pair, alignment, band: request.band });
  const { norms } = alignment;
  const scales = [1 / Math.sqrt(norms[0]), 1 / Math.sqrt(norms[1])] as const;
  const mismatch =
    norms[0] > 0 && norms[1] > 0 ? residualSum(pair, request.response, scales, alignment.x, alignment.turnRad) / 2 : Number.NaN;
  return {
    // Below ½ the residual is the sharper of the two and keeps the match at most 1.
    match: mismatch < 0.5 ? 1 - mismatch : alignment.value,
    mismatch,
    timeShiftS: request.maximise.includes('time') ? shiftS(pair, alignment.x) : 0,
    ...turnsOf(request, placement, alignment.turnRad),
    ...(searched.inclination ? { inclinationRad: placement.inclinationRad } : {}),
    ...(searched.mass ? { massFactor: placement.massFactor, onBound } : {}),
  };
}

const sweptOutcome = (request: MatchRequest, { pair, value, mismatch, x, turnRad }: SweptAlignment): MatchOutcome => ({
  match: value,
  mismatch,
  timeShiftS: request.maximise.includes('time') ? shiftS(pair, x) : 0,
  phaseShiftRad: turnRad,
});

function residualPower(request: MatchRequest, at: MatchOutcome, store: SpectrumStore, numerics: Numerics): number {
  const search = new JointSearch(request, searchedIn(request), store, numerics);
  const massFactor = at.massFactor ?? 1;
  const modes = request.b.waveform.content.kind === 'modes' && request.response === 'complex';
  const placement = {
    massFactor,
    inclinationRad: at.inclinationRad ?? request.b.inclinationRad,
    azimuthShiftRad: modes ? at.phaseShiftRad : 0,
  };
  const pair: Pair = search.pairAt(placement);
  const b = at.massFactor === undefined ? request.b : request.rescale(request.b, massFactor);
  const x = xOfShift(pair, at.timeShiftS);
  const sum = residualSum(pair, request.response, [strainScale(request.a), strainScale(b)], x, turnAt(request, at));
  return (request.response === 'complex' ? 2 : 4) * pair.weights.dfHz * sum;
}

function modePower(side: Side, band: Band, store: SpectrumStore, numerics: Numerics): number {
  const { content } = side.waveform;
  if (content.kind !== 'modes') return Number.NaN;
  const scale = strainScale(side);
  return content.modes.reduce((sum, _, index) => {
    return piecesOf(side, band, store).reduce((total, piece) => {
      const { spectra, weights } = preparePiece(piece, store, numerics, [{ kind: 'mode', index }]);
      return total + 2 * weights.dfHz * scale * scale * normOf(spectra[0]!, 'complex', weights);
    }, sum);
  }, 0);
}

interface Sight {
  readonly inclinationRad: number;
  readonly azimuthRad: number;
}

/** Many lines of sight at one mass: the modes are transformed once and summed bin by bin. */
function pieceGrams(piece: Piece, sights: readonly Sight[], store: SpectrumStore, numerics: Numerics): ResponseGram[] {
  const { side, band } = piece;
  const prepared = preparePiece(piece, store, numerics);
  const bank = modeBank(side, prepared.dF[0]!, band.fHighHz * side.secondsPerUnit, store, numerics);
  const { weights } = prepared;
  const last = weights.first + weights.values.length - 1;
  return sights.map(({ inclinationRad, azimuthRad }) => {
    const s = bank.length === 0 ? prepared.spectra[0]! : lineSpectrum(bank, inclinationRad, azimuthRad, weights.first, last);
    return gramOf(s, weights, strainScale(side));
  });
}

function grams(side: Side, band: Band, sights: readonly Sight[], store: SpectrumStore, numerics: Numerics): ResponseGram[] {
  const pieces = piecesOf(side, band, store).map((piece) => pieceGrams(piece, sights, store, numerics));
  return sights.map((_, i) => sumOf(pieces.map((piece) => piece[i]!)));
}

function lineGram(side: Side, band: Band, store: SpectrumStore, numerics: Numerics): ResponseGram {
  return sumOf(
    piecesOf(side, band, store).map((piece) => {
      const { spectra, weights } = preparePiece(piece, store, numerics);
      return gramOf(spectra[0]!, weights, strainScale(side));
    }),
  );
}

/**
 * Route A with its knobs and its memory.
 * Shape:  see DetectorRoute; variants that share a store share what their knobs leave alone.
 * Units:  see DetectorRoute.
 * Error:  as the knobs say; 1e-12 of the value on smooth, well sampled data.
 * Fails:  never; no power in the band gives norms of 0 and matches of NaN.
 * Source: engine design: one transform per waveform on its own axis, masses stretch the frequencies.
 */
export function createRouteA(numerics: Numerics = houseNumerics, store: SpectrumStore = new SpectrumStore()): DetectorRoute {
  const overlap = (a: Side, b: Side, band: Band, response: Response): number =>
    outcomeOf({ a, b, band, response, maximise: [], templateMassRange: [1, 1], rescale: (side) => side }, store, numerics).match;
  return {
    name: 'A',
    gram: (side, band) => lineGram(side, band, store, numerics),
    grams: (side, band, sights) => grams(side, band, sights, store, numerics),
    sights: (request) => (request.mass === undefined ? sightMatcher(request, store, numerics) : massSights(request, request.mass, store, numerics)),
    powerOf: closedFormPower,
    modePower: (side, band) => modePower(side, band, store, numerics),
    overlap,
    match: (request) => outcomeOf(request, store, numerics),
    bestTemplates: (signals, request) => bestTemplates(signals, request, store, numerics),
    residualPower: (request, at) => residualPower(request, at, store, numerics),
  };
}

export const routeA: DetectorRoute = createRouteA();
