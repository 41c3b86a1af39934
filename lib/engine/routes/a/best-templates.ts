import type { BestTemplate, MatchRequest, Side, TemplateRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { brentMaximum } from '@/lib/engine/series/brent-maximum';
import { JointSearch, massGrid } from './joint-search';
import type { Numerics } from './numerics';
import type { SpectrumStore } from './spectrum-store';
import { sharpBank, templateBank, type TemplateBank } from './template-bank';
import { reachFor } from './template-frame';
import { scanTemplates, sourceOf, type TemplateScan } from './template-scan';

export interface Context {
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
}

/** Where a signal's best template stands, before its outcome is read. */
export interface BestPlace {
  readonly index: number;
  readonly massFactor: number;
}

type RealRequest = TemplateRequest & { readonly response: Exclude<Response, 'complex'> };

/** A shift and a turn are found by one transform, a mass by stretching frequencies; any other freedom is searched pair by pair. */
export function isScannable(signals: readonly Side[], request: TemplateRequest): request is RealRequest {
  const free = new Set(request.maximise);
  const known = [...free].every((what) => what === 'time' || what === 'phase' || what === 'templateMass');
  return known && free.has('time') && free.has('phase') && request.response !== 'complex' && [...signals, ...request.templates].every(({ waveform }) => waveform.domain === 'time');
}

export const pairRequest = ({ templates, onStep: _, ...shared }: TemplateRequest, a: Side, index: number): MatchRequest => ({ ...shared, a, b: templates[index]! });

/** What the rough values of a scan can be low by: 1.1 % was seen on the flanks of a hill. */
const ROUGH_BELOW = 0.02;
/** What the sharp ones can be off by. */
const SHARP = 5e-5;
/** Of ln of the factor (rule 2.7). */
const REFINED = 1e-5;
/** What the search reads of a scan. */
type Scanned = Pick<TemplateScan, 'rough' | 'sharp'>;

interface Hill {
  readonly template: number;
  /** Place in the grid of factors. */
  readonly factor: number;
  /** No mass beside this grid point gives more. */
  readonly ceiling: number;
}

/** Sharp values of one signal, each computed once. */
class SharpValues {
  private readonly known = new Map<number, number>();

  constructor(
    private readonly scan: Scanned,
    private readonly factors: readonly number[],
  ) {}

  /** Place of the last factor. */
  get last(): number {
    return this.factors.length - 1;
  }

  /** At a place in the grid, or half-way to the next; places beyond its ends are its ends. */
  at(template: number, place: number): number {
    const g = Math.min(this.last, Math.max(0, place));
    const key = template * this.factors.length + g;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const [low, high] = [this.factors[Math.floor(g)]!, this.factors[Math.ceil(g)]!];
    const made = this.scan.sharp(template, low === high ? low : Math.sqrt(low * high));
    this.known.set(key, made);
    return made;
  }
}

/** Grid points that could stand beside the best match, by mass, since a scan holds the spectra of one mass at a time. */
function likely(scan: Scanned, templates: number, factors: number): { t: number; g: number }[] {
  const rough = (t: number, g: number): number => scan.rough[t * factors + g]!;
  let best = 0;
  for (let t = 0; t < templates; t++) for (let g = 0; g < factors; g++) best = Math.max(best, rough(t, g));
  const least = 1 - ROUGH_BELOW;
  const found: { t: number; g: number }[] = [];
  for (let g = 0; g < factors; g++) {
    for (let t = 0; t < templates; t++) {
      const around = Math.max(rough(t, Math.max(0, g - 1)), rough(t, g), rough(t, Math.min(factors - 1, g + 1)));
      const drop = around - Math.min(rough(t, Math.max(0, g - 1)), rough(t, Math.min(factors - 1, g + 1)));
      // What the hill may rise between grid points counts as well.
      if (rough(t, g) + drop > best * least && rough(t, g) > around * least) found.push({ t, g });
    }
  }
  return found;
}

/**
 * What a hill may reach that is highest at one of its points: half the drop to the farther neighbour above it, twice what a hill of
 * constant bend can rise, and all that one with straight flanks can. The shift that fits best may jump between masses, so hills have edges.
 */
function reachOf(values: SharpValues, t: number, at: number, step: number): number {
  const here = values.at(t, at);
  return here + Math.max(0, here - Math.min(values.at(t, at - step), values.at(t, at + step))) / 2;
}

/** The same from half a step on either side, where the grid itself does not settle it. */
function ceilingOf(values: SharpValues, t: number, g: number, best: number): number {
  if (values.last === 0) return values.at(t, g);
  const coarse = reachOf(values, t, g, 1);
  if (coarse + SHARP < best) return coarse;
  const top = [g - 0.5, g, g + 0.5].reduce((high, at) => (values.at(t, at) > values.at(t, high) ? at : high), g);
  return reachOf(values, t, top, 0.5);
}

/** The grid point above both neighbours that lies uphill: a rough value may point beside the top. */
function uphill(values: SharpValues, t: number, from: number, factors: number): number {
  for (let g = from; ; ) {
    const higher = [g - 1, g + 1].find((at) => at >= 0 && at < factors && values.at(t, at) > values.at(t, g) + SHARP);
    if (higher === undefined) return g;
    g = higher;
  }
}

/**
 * Grid points above both neighbours that could hide the best match, the most promising first.
 * Shape:  one entry a hill of one signal.
 * Units:  places in the lists of templates and factors; ceilings are matches.
 * Error:  a hill is missed only where every rough value on it is low by more than two per cent.
 * Fails:  never; no power gives no hill.
 * Source: settings.md rule 2.7.
 */
export function hillsOf(scan: Scanned, templates: number, factors: readonly number[]): Hill[] {
  const values = new SharpValues(scan, factors);
  const places = likely(scan, templates, factors.length);
  for (const { t, g } of places) values.at(t, g);
  const tops = new Map(places.map(({ t, g }) => { const top = uphill(values, t, g, factors.length); return [`${t} ${top}`, { t, g: top }] as const; }));
  const best = [...tops.values()].reduce((most, { t, g }) => Math.max(most, values.at(t, g)), 0);
  const hills = [...tops.values()].map(({ t, g }): Hill => ({ template: t, factor: g, ceiling: ceilingOf(values, t, g, best) + SHARP }));
  return hills.sort((p, q) => q.ceiling - p.ceiling || p.template - q.template || p.factor - q.factor);
}

/** The top of one hill by the scan. */
function topOf(scan: TemplateScan, { template, factor }: Hill, factors: readonly number[]): Summit {
  const here = factors[factor]!;
  if (factors.length === 1) return { index: template, massFactor: here, value: scan.sharp(template, here) };
  const [low, high] = [factors[Math.max(0, factor - 1)]!, factors[Math.min(factors.length - 1, factor + 1)]!];
  const { x, value } = brentMaximum((at) => scan.sharp(template, Math.exp(at)), Math.log(low), Math.log(high), Math.log(here), REFINED);
  // The ends of the range are the range's own numbers, not e^{ln x}.
  return { index: template, massFactor: [low, high].find((end) => Math.abs(x - Math.log(end)) < 1e-14) ?? Math.exp(x), value };
}

interface Summit extends BestPlace {
  readonly value: number;
}

const highest = (tops: readonly Summit[]): Summit | undefined =>
  tops.reduce<Summit | undefined>((best, top) => (best === undefined || top.value > best.value || (top.value === best.value && top.index < best.index) ? top : best), undefined);

/** Its height on the route's own bins. */
function heightOf({ index, massFactor }: Summit, a: Side, request: RealRequest, searched: boolean, { store, numerics }: Context): Summit {
  const search = new JointSearch(pairRequest(request, a, index), { mass: searched, inclination: false, azimuth: false }, store, numerics);
  return { index, massFactor, value: search.valueAt({ massFactor, inclinationRad: request.templates[index]!.inclinationRad, azimuthShiftRad: 0 }) };
}

/** The highest of all hills; the scan's own bins do not tell hills of nearly one height apart. */
function bestOf(scan: TemplateScan, a: Side, request: RealRequest, factors: readonly number[], context: Context): BestPlace {
  const tops: Summit[] = [];
  const best = (): number => highest(tops)?.value ?? -Infinity;
  for (const hill of hillsOf(scan, request.templates.length, factors)) {
    if (hill.ceiling < best() - SHARP) break;
    tops.push(topOf(scan, hill, factors));
  }
  const near = tops.filter(({ value }) => value >= best() - 2 * SHARP);
  const { index, massFactor } = (near.length > 1 ? highest(near.map((top) => heightOf(top, a, request, factors.length > 1, context))) : near[0]) ?? { index: 0, massFactor: 1 };
  return { index, massFactor };
}

/**
 * The best template of each signal, and the factor on its mass.
 * Shape:  one place a signal. Memory: the held spectra cut to the band, and one number for each signal, template and factor.
 * Units:  factors on the template's own mass.
 * Error:  the factor to 1e-5; the template is that of the full search as long as a hill between grid points rises by no more than it falls to its neighbours.
 * Fails:  never; signals without power in the band get the first template.
 * Source: settings.md rule 2.7 (grid of ratio 1.02, then refined to 1e-5).
 */
export function bestPlaces(signals: readonly Side[], request: RealRequest, context: Context, everywhere = false): BestPlace[] {
  const factors = request.maximise.includes('templateMass') ? massGrid(request.templateMassRange) : [1];
  const shared = { signals, factors, request, ...context };
  const bank = templateBank(shared, reachFor(request.band.noise));
  const sharpest = sharpBank(shared, bank);
  let whole: TemplateBank | null = null;
  return signals.map((a, s) => {
    const onStep = (): void => request.onStep?.((1 + s / signals.length) / 2);
    onStep();
    const source = sourceOf(sharpest, a, shared);
    const scanOf = (looked: TemplateBank): TemplateScan => scanTemplates(looked, sharpest, a, source, factors, { everywhere, onStep });
    const scan = scanOf(bank);
    return bestOf(scan.unsettled ? scanOf((whole ??= templateBank(shared, 'all'))) : scan, a, request, factors, context);
  });
}

/**
 * Pair by pair, as `match` does it.
 * Shape:  one answer a signal; the first of equal templates.
 * Units:  as `match`.
 * Error:  as `match`.
 * Fails:  never; a match of NaN loses to every number.
 * Source: settings.md section 3.
 */
export function bestByPairs(signals: readonly Side[], request: TemplateRequest, matchOf: (pair: MatchRequest) => BestTemplate['outcome']): BestTemplate[] {
  const pairs = signals.length * request.templates.length;
  return signals.map((a, s) => {
    let best: BestTemplate | null = null;
    request.templates.forEach((_, index) => {
      request.onStep?.((s * request.templates.length + index) / pairs);
      const outcome = matchOf(pairRequest(request, a, index));
      if (best === null || outcome.match > best.outcome.match || (Number.isNaN(best.outcome.match) && !Number.isNaN(outcome.match))) best = { index, outcome };
    });
    return best!;
  });
}
