import type { MatchRequest, Side } from '@/lib/engine/contract/route';
import { climbSimplex } from '@/lib/engine/series/simplex-search';
import { align, freedomOf, type Alignment, type Pair } from './alignment';
import { lineSpectrum, modeBank, type ModeBank } from './mode-bank';
import type { Numerics } from './numerics';
import { prepare, type Prepared } from './prepare';
import type { SpectrumStore } from './spectrum-store';

/** What b is given beyond a shift and a turn. */
export interface Placement {
  readonly massFactor: number;
  readonly inclinationRad: number;
  readonly azimuthShiftRad: number;
}

export interface JointOutcome {
  readonly pair: Pair;
  readonly alignment: Alignment;
  readonly placement: Placement;
  readonly onBound: boolean;
}

/** Which parameters of b are searched over numerically. */
export interface Searched {
  readonly mass: boolean;
  readonly inclination: boolean;
  readonly azimuth: boolean;
}

/**
 * Which of the template's own parameters a request leaves free; a phase is an azimuth where the response is complex and there are modes to turn.
 * Shape:  one flag a parameter.
 * Units:  none.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md rule 2.7.
 */
export function searchedIn(request: MatchRequest): Searched {
  const has = (what: 'inclination' | 'templateMass' | 'phase'): boolean => request.maximise.includes(what);
  const modes = request.b.waveform.content.kind === 'modes';
  return {
    mass: has('templateMass'),
    inclination: has('inclination') && modes,
    azimuth: request.response === 'complex' && has('phase') && modes,
  };
}

const MASS_RATIO = 1.02;
const INCLINATIONS = 19;
const AZIMUTHS = 24;
const KEPT_STARTS = 3;
/** Of the first step of each parameter (0.01 in ln M, 5°, 7.5°): about 1e-6 of the parameter itself. */
const TOLERANCE = 2e-5;
const MASS_STEP = 0.01;
const INCLINATION_STEP = Math.PI / 36;
const AZIMUTH_STEP = Math.PI / 24;
/** A maximum this close to a bound of the mass range is on it. */
const BOUND_SHARE = 1e-6;

/** Factors on the template's mass, ends included. */
export function massGrid([low, high]: readonly [number, number], ratio = MASS_RATIO): number[] {
  const steps = Math.max(1, Math.ceil(Math.log(high / low) / Math.log(ratio)));
  return Array.from({ length: steps + 1 }, (_, i) => low * (high / low) ** (i / steps));
}

/** Inclinations past a pole come back on the other side. */
function folded(inclinationRad: number): number {
  const turn = ((inclinationRad % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
  return turn > Math.PI ? 2 * Math.PI - turn : turn;
}

interface MassSlice {
  readonly factor: number;
  readonly sides: readonly [Side, Side];
  readonly prepared: Prepared;
  readonly bank: ModeBank | null;
}

export class JointSearch {
  private slice: MassSlice | null = null;

  constructor(
    private readonly request: MatchRequest,
    private readonly searched: Searched,
    private readonly store: SpectrumStore,
    private readonly numerics: Numerics,
  ) {}

  /** Bins are planned for the longest template, so that the spectrum of a serves all masses. */
  private sliceAt(factor: number): MassSlice {
    if (this.slice?.factor === factor) return this.slice;
    const { request, searched, store, numerics } = this;
    const b = searched.mass ? request.rescale(request.b, factor) : request.b;
    const sides = [request.a, b] as const;
    const longest = searched.mass ? { longestS: this.longestS() } : {};
    const prepared = prepare({ sides, band: request.band, absoluteTimes: !request.maximise.includes('time'), ...longest }, store, numerics);
    const bank =
      searched.inclination || searched.azimuth
        ? modeBank(b, prepared.dF[1]!, request.band.fHighHz * b.secondsPerUnit, store, numerics)
        : null;
    this.slice = { factor, sides, prepared, bank };
    return this.slice;
  }

  private longestS(): number {
    const { waveform, secondsPerUnit } = this.request.rescale(this.request.b, this.request.templateMassRange[1]);
    const span = waveform.domain === 'frequency' ? this.store.frequency(waveform).span : this.store.time(waveform).span;
    return span * secondsPerUnit;
  }

  pairAt(placement: Placement): Pair {
    const { prepared, sides, bank } = this.sliceAt(placement.massFactor);
    const { weights, spectra, lagStride } = prepared;
    const last = weights.first + weights.values.length - 1;
    const b =
      bank === null
        ? spectra[1]!
        : lineSpectrum(bank, placement.inclinationRad, sides[1].azimuthRad + placement.azimuthShiftRad, weights.first, last);
    return { a: spectra[0]!, b, weights, lagStride, secondsPerUnit: sides.map((side) => side.secondsPerUnit) };
  }

  valueAt(placement: Placement): number {
    const { response, maximise, b } = this.request;
    const { value } = align(this.pairAt(placement), freedomOf(response, maximise, b.waveform.content.kind === 'modes'));
    return Number.isNaN(value) ? -Infinity : value;
  }

  /** Every point of the grid, best first. */
  private starts(): Placement[] {
    const { request, searched } = this;
    const masses = searched.mass ? massGrid(request.templateMassRange) : [1];
    const inclinations = searched.inclination
      ? Array.from({ length: INCLINATIONS }, (_, i) => (i * Math.PI) / (INCLINATIONS - 1))
      : [request.b.inclinationRad];
    const azimuths = searched.azimuth ? Array.from({ length: AZIMUTHS }, (_, i) => (i * 2 * Math.PI) / AZIMUTHS) : [0];
    const found: { placement: Placement; value: number }[] = [];
    for (const massFactor of masses) {
      for (const inclinationRad of inclinations) {
        for (const azimuthShiftRad of azimuths) {
          const placement = { massFactor, inclinationRad, azimuthShiftRad };
          found.push({ placement, value: this.valueAt(placement) });
        }
      }
    }
    return found
      .sort((p, q) => q.value - p.value)
      .slice(0, KEPT_STARTS)
      .map((entry) => entry.placement);
  }

  private refined(start: Placement): { placement: Placement; value: number } {
    const { searched, request } = this;
    const [low, high] = request.templateMassRange;
    const kinds = (['mass', 'inclination', 'azimuth'] as const).filter((kind) => searched[kind]);
    const placementAt = (at: readonly number[]): Placement => {
      const read = (kind: (typeof kinds)[number], otherwise: number): number => (searched[kind] ? at[kinds.indexOf(kind)]! : otherwise);
      const factor = Math.exp(read('mass', Math.log(start.massFactor)));
      return {
        massFactor: searched.mass ? Math.min(high, Math.max(low, factor)) : start.massFactor,
        inclinationRad: folded(read('inclination', start.inclinationRad)),
        azimuthShiftRad: read('azimuth', start.azimuthShiftRad),
      };
    };
    const first = { mass: Math.log(start.massFactor), inclination: start.inclinationRad, azimuth: start.azimuthShiftRad };
    const steps = { mass: MASS_STEP, inclination: INCLINATION_STEP, azimuth: AZIMUTH_STEP };
    const top = climbSimplex(
      (at) => this.valueAt(placementAt(at)),
      kinds.map((kind) => first[kind]),
      kinds.map((kind) => steps[kind]),
      { tolerance: TOLERANCE, evaluations: 160 * kinds.length },
    );
    return { placement: placementAt(top.at), value: top.value };
  }

  /**
   * The joint maximum over everything that is free.
   * Shape:  one placement of b with the pair of spectra at it.
   * Units:  factor on b's mass, angles in rad.
   * Error:  parameters to about 1e-6, the value quadratically better; the best three grid points are refined.
   * Fails:  never; a value of −∞ means no power in the band.
   * Source: settings.md rule 2.7 (24 azimuths, 19 inclinations, mass grid of ratio 1.02).
   */
  run(): JointOutcome {
    const { request, searched } = this;
    const still = { massFactor: 1, inclinationRad: request.b.inclinationRad, azimuthShiftRad: 0 };
    const none = !searched.mass && !searched.inclination && !searched.azimuth;
    return none ? this.at(still) : this.at(this.bestPlacement(still));
  }

  private bestPlacement(still: Placement): Placement {
    const refined = this.starts().map((start) => this.refined(start));
    return refined.reduce((p, q) => (q.value > p.value ? q : p), refined[0] ?? { placement: still, value: 0 }).placement;
  }

  /** The outcome at one placement, wherever it came from. */
  at(placement: Placement): JointOutcome {
    const { request, searched } = this;
    const pair = this.pairAt(placement);
    const alignment = align(pair, freedomOf(request.response, request.maximise, request.b.waveform.content.kind === 'modes'), request.nearShiftS);
    const [low, high] = request.templateMassRange;
    const near = (bound: number): boolean => Math.abs(Math.log(placement.massFactor / bound)) < BOUND_SHARE;
    return { pair, alignment, placement, onBound: searched.mass && (near(low) || near(high)) };
  }
}
