import type { MatchRequest, Side } from '@/lib/engine/contract/route';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { freedomOf, type Freedom } from './alignment';
import { searchedIn } from './joint-search';
import { nodeOrder } from './node-order';
import type { Numerics } from './numerics';
import { PairSweep, type Found, type SweptAlignment } from './pair-sweep';
import { taperKey, type SpectrumStore } from './spectrum-store';

/** What was asked of one pair under one noise curve, mass after mass. */
export interface SweepMemory {
  readonly b: Waveform;
  readonly noise: NoiseCurve;
  readonly key: string;
  /** The mass of the last request, in seconds a unit. */
  lastSeconds: number;
  found: Found | null;
  /** Null where the bins must do; absent until a second mass close to the first pays for it. */
  sweep?: PairSweep | null;
}

const MOST_MEMORIES = 8;
/** Neighbours closer than this share one set of nodes often enough to pay for it; points spread further are left to the bins. */
const CLOSE = 1.06;

const sideKey = ({ taper, inclinationRad, azimuthRad }: Side): string => `${taperKey(taper)},${inclinationRad},${azimuthRad}`;

/** Only a shift and a turn may be free, and a shift only with a turn: else hills stand a cycle apart. */
function sweepable(request: MatchRequest, { time, turn }: Freedom, numerics: Numerics): boolean {
  const { a, b, response, nearShiftS } = request;
  const { mass, inclination, azimuth } = searchedIn(request);
  if (!numerics.compress || !numerics.refineBins || nearShiftS !== undefined) return false;
  if (response === 'complex' || mass || inclination || azimuth || (time && !turn)) return false;
  return a.waveform.domain === 'time' && b.waveform.domain === 'time';
}

function memoryOf(request: MatchRequest, store: SpectrumStore, numerics: Numerics): SweepMemory {
  const { a, b, band, response, maximise } = request;
  const ratio = Number((b.secondsPerUnit / a.secondsPerUnit).toPrecision(14));
  const key = JSON.stringify([ratio, sideKey(a), sideKey(b), band.fLowHz, response, maximise, numerics]);
  const list = store.sweeps(a.waveform);
  const known = list.find((m) => m.b === b.waveform && m.noise === band.noise && m.key === key);
  if (known) return known;
  const made: SweepMemory = { b: b.waveform, noise: band.noise, key, lastSeconds: 0, found: null };
  if (list.length >= MOST_MEMORIES) list.shift();
  list.push(made);
  return made;
}

/** A sweep's next point, and where to leave what the bins found if it could not be read from nodes. */
export interface SweepStep {
  readonly swept: SweptAlignment | null;
  readonly remember: (found: Found) => void;
}

function sweepFrom(memory: SweepMemory, request: MatchRequest, freedom: Freedom, store: SpectrumStore, numerics: Numerics): PairSweep | null {
  const { response, band } = request;
  if (memory.found === null || response === 'complex') return null;
  const weigher = store.weigher(band.noise, numerics.noiseTableHalvings);
  const order = nodeOrder(weigher, band.fLowHz, Math.min(band.fHighHz, band.noise.fHighHz));
  return order === null && weigher.closedForm ? null : PairSweep.from(memory.found, { response, freedom, weigher, order, numerics });
}

/**
 * One point of what may be a sweep over mass: the second of two close masses makes nodes of the bins, and what follows is read from them.
 * Shape:  `swept` null where the bins must decide; what they find is then to be remembered.
 * Units:  none.
 * Error:  a point read from nodes differs from the same point alone by less than 1e-12 of a match.
 * Fails:  never; the same requests in the same order give the same bytes.
 * Source: engine design (compressed nodes).
 */
export function sweepStep(request: MatchRequest, store: SpectrumStore, numerics: Numerics): SweepStep | null {
  const freedom = freedomOf(request.response, request.maximise, request.b.waveform.content.kind === 'modes');
  if (!sweepable(request, freedom, numerics)) return null;
  const memory = memoryOf(request, store, numerics);
  const seconds = request.a.secondsPerUnit;
  const ratio = Math.max(seconds, memory.lastSeconds) / Math.min(seconds, memory.lastSeconds);
  memory.lastSeconds = seconds;
  if (memory.sweep === undefined && ratio > 1 && ratio < CLOSE) memory.sweep = sweepFrom(memory, request, freedom, store, numerics);
  const swept = memory.sweep && ratio < CLOSE ? memory.sweep.outcomeAt(request) : null;
  const remember = (found: Found): void => {
    memory.found = found;
    memory.sweep?.saw(found);
    // Finer bins serve the masses that follow as well.
    if (memory.sweep && found.pair.a.dF < memory.sweep.dF) delete memory.sweep;
  };
  return { swept, remember };
}
