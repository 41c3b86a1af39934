import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { canRescale, detectorPoint, sideIn, waveformsIn, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';
import type { MeasureRequest } from '@/lib/engine/contract/quantity';
import type { Side } from '@/lib/engine/contract/route';
import * as look from '@/lib/engine/findings/detector-findings';
import { short } from '@/lib/engine/findings/spelt';
import { recordFindings } from '@/lib/engine/findings/record-findings';
import { evenLines, MOST_EVEN_LINES } from '@/lib/engine/routes/a/bin-plan';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { powerInResponse } from './loudness';
import type { DetectorQuantity, Walk } from './measure-detector';
import type { Evaluated } from './recipe';

const roleWaveforms = waveformsIn;

const harmonicSize =
  (side: Side) =>
  (l: number, m: number): number => {
    const y = spinWeightedHarmonic(l, m, side.inclinationRad, side.azimuthRad);
    return Math.hypot(y.re, y.im);
  };

const stop = (code: string, where: string, text: string, fix: string): Finding => ({ code, level: 'stops-lodging', where, text, fix });

/** Variables that have no strain, and masses that cannot mean what the claim says. */
function waveformStops(request: PointRequest, point: DetectorPoint): (Finding | null)[] {
  return roleWaveforms(request).flatMap((c) => {
    const { name, variable } = c.given;
    const foreign = variable === 'phi2' || variable === 'luminosity';
    const frozen = request.declared.massFrame === 'source' && !canRescale(c.given);
    return [
      foreign
        ? stop(
            'engine/not-a-strain',
            name,
            `${name} holds ${variable}, from which no strain follows.`,
            'Claim a quantity of gravitational waves on strain, news or ψ₄.',
          )
        : null,
      frozen
        ? stop(
            'engine/mass-not-rescalable',
            name,
            `${name} is a physical strain without a mass and distance of its own; a source-frame mass cannot be applied to it.`,
            'Give totalMassMsun and distanceMpc beside the file, or declare massFrame "detector".',
          )
        : null,
      Number.isFinite(point.a.secondsPerUnit)
        ? null
        : stop(
            'engine/setting-missing',
            name,
            `The mass or the redshift of ${name} is not known.`,
            'Declare totalMassMsun, and redshift or distanceMpc for a source-frame mass.',
          ),
    ];
  });
}

/** Fewer samples than this are no curve that two routes could read alike. */
const LEAST_SAMPLES = 16;

function shortStops(request: PointRequest): (Finding | null)[] {
  return roleWaveforms(request).map(({ given }) =>
    given.axis.length >= LEAST_SAMPLES
      ? null
      : stop(
          'engine/too-few-points',
          given.name,
          `${given.name} has ${given.axis.length} samples; at least ${LEAST_SAMPLES} are needed to read it between them.`,
          'Attach the waveform with more samples.',
        ),
  );
}

/** Records further apart than this many of their own lengths share no time; only a free shift brings them together. */
const MOST_LENGTHS_APART = 50;

function apartStop(point: DetectorPoint): Finding | null {
  const { a, b } = point;
  if (b === null || point.maximise.includes('time') || a.waveform.domain !== 'time' || b.waveform.domain !== 'time') return null;
  const [from, to] = [a, b].map(({ waveform: { axis }, secondsPerUnit }) => ({
    start: axis[0]! * secondsPerUnit,
    end: axis[axis.length - 1]! * secondsPerUnit,
  }));
  const gap = Math.max(to!.start - from!.end, from!.start - to!.end);
  if (!(gap > MOST_LENGTHS_APART * (from!.end - from!.start + to!.end - to!.start))) return null;
  const text = `${a.waveform.name} ends at ${short(from!.end)} s and ${b.waveform.name} starts at ${short(to!.start)} s, as the files time them (the other way round, ${short(from!.start)} and ${short(to!.end)} s): they share no time.`;
  return stop('engine/records-far-apart', b.waveform.name, text, 'Shift one of the files, or claim a match, which moves b in time.');
}

/** Products of two waveforms stand on one even grid; a shift is sought on all of it. */
function tooManyLines({ a, b, band, maximise }: DetectorPoint, needsPair: boolean, store: SpectrumStore): Finding | null {
  if (b === null || !needsPair) return null;
  const lines = evenLines({ sides: [a, b], band, absoluteTimes: !maximise.includes('time') }, store);
  if (!(lines > MOST_EVEN_LINES)) return null;
  const file = (a.waveform.domain === 'frequency' ? a : b).waveform.name;
  const text = `Between ${short(band.fLowHz, 6)} and ${short(band.fHighHz, 6)} Hz the product of ${a.waveform.name} and ${b.waveform.name} would need ${short(lines)} evenly spaced frequencies; at most ${MOST_EVEN_LINES} are held.`;
  return stop('engine/too-many-lines', file, text, 'Raise fLowHz or lower fHighHz, or attach the waveform as a time series.');
}

function maximiseStops(point: DetectorPoint, request: PointRequest): (Finding | null)[] {
  const { maximise, response } = point;
  const lacking = roleWaveforms(request).find((c) => c.given.content.kind !== 'modes');
  const turned = maximise.includes('polarisation') && response !== 'complex';
  const moved = [...(request.b === null ? [] : [request.b]), ...(request.templates ?? [])];
  const inclined = maximise.includes('inclination') && moved.some(({ given }) => given.content.kind !== 'modes');
  return [
    turned
      ? stop(
          'engine/polarisation-needs-complex',
          'maximise',
          'The polarisation can only be maximised over when both polarisations are used; the response of this claim is one of them.',
          'Declare response "complex", or leave out "polarisation".',
        )
      : null,
    inclined
      ? stop(
          'engine/inclination-needs-modes',
          lacking!.given.name,
          'The inclination can only be maximised over for a waveform given as modes.',
          'Attach the modes, or leave out "inclination".',
        )
      : null,
  ];
}

function pointStops(quantity: DetectorQuantity, request: PointRequest, store: SpectrumStore): Finding[] {
  const point = detectorPoint(request);
  const { band } = point;
  const c = roleWaveforms(request);
  const sides = c.map((waveform) => sideIn(point, request, waveform));
  const anywhere = request.traits.goesOver?.inclination === true && request.declared.inclinationRad === undefined;
  const allSky = point.average === 'sky-orientation' || point.average === 'volume' || anywhere;
  const empty =
    band.fHighHz > band.fLowHz
      ? null
      : look.noSignal(
          request.a.given.name,
          `between ${short(band.fLowHz, 6)} and ${short(band.fHighHz, 6)} Hz: its samples carry nothing above the lower edge`,
        );
  const found = [
    ...waveformStops(request, point),
    look.bandBeyondCurve(point),
    look.averageTwice(point),
    look.averageWithoutModes(point, c),
    ...maximiseStops(point, request),
    ...shortStops(request),
    apartStop(point),
    ...[point.b, ...point.templates].map((b) => tooManyLines({ ...point, b }, !request.traits.loudness, store)),
    request.traits.horizon ? null : empty,
    ...(quantity.recipe.stops?.(request) ?? []),
    ...c.map((waveform, i) => look.nothingSeen(waveform, sides[i] ?? sides[0]!, harmonicSize(sides[i] ?? sides[0]!), allSky)),
  ];
  return found.filter((finding) => finding !== null);
}

/** One entry per text: points of a sweep often stop for the same reason. */
const distinct = (findings: readonly Finding[]): Finding[] => [
  ...new Map(findings.map((f) => [`${f.code}|${f.where}|${f.text}`, f])).values(),
];

/** What makes a claim impossible to compute, read off before any transform; one message for each cause. */
export function stopsOf(quantity: DetectorQuantity, _request: MeasureRequest, requests: readonly PointRequest[], store: SpectrumStore): Finding[] {
  // The curve is one for all points, and reading it takes as long as a spectrum.
  const invalid = look.curveInvalid(requests[0]!.noise);
  const all = invalid === null ? distinct(requests.flatMap((request) => pointStops(quantity, request, store))) : [invalid];
  const seen = new Set<string>();
  return all.filter(({ code, where }) => !seen.has(`${code}|${where}`) && seen.add(`${code}|${where}`));
}

/** Of the power along a line of sight, a response that gets less than this sees rounding only. */
const NOTHING = 1e-22;

/** Stops that only the numbers show: no power in the band, or a response that sees none of it. */
export function valueStops(_quantity: DetectorQuantity, walk: Walk, found: readonly Evaluated[]): Finding[] {
  const stops = found.flatMap((here, i) => {
    const request = walk.requests[i]!;
    if (Number.isFinite(here.value) && !(here.value === 0 && request.traits.loudness)) return [];
    const point = detectorPoint(request);
    if (request.traits.horizon && here.roots === undefined) return [look.noHorizon(request.a.given.name, point.threshold)];
    return [
      look.noSignal(
        request.a.given.name,
        `between ${short(point.band.fLowHz, 6)} and ${short(point.band.fHighHz, 6)} Hz${request.b ? `, or ${request.b.given.name} has none` : ''}, or the value is not finite`,
      ),
    ];
  });
  return distinct(stops.length > 0 ? stops.slice(0, 1) : blindResponse(walk));
}

/** Of waveforms with the same modes one speaks for all: a response that sees none of it is a matter of the harmonics. */
function apartInModes(waveforms: readonly ConditionedWaveform[]): ConditionedWaveform[] {
  const key = ({ given: { name, content } }: ConditionedWaveform): string => (content.kind === 'modes' ? content.modes.map(({ l, m }) => `${l},${m}`).join(' ') : name);
  return [...new Map(waveforms.map((c) => [key(c), c] as const)).values()];
}

/** For example the cross polarisation of an edge-on binary: what is left are the last digits of the harmonics. */
function blindResponse({ requests, kitA }: Walk): Finding[] {
  const request = requests[0]!;
  const point = detectorPoint(request);
  if (point.response === 'complex' || point.average !== 'optimal') return [];
  return apartInModes(waveformsIn(request)).map((c) => sideIn(point, request, c)).flatMap((side) => {
    const gram = kitA.route.gram(side, point.band);
    const sees = powerInResponse(gram, point.response);
    if (sees > NOTHING * (gram.plusPlus + gram.crossCross)) return [];
    return [look.noSignal(side.waveform.name, 'in the response of the claim along its line of sight')];
  });
}

/** What a file shows by itself, in the modes in use. */
function recordsOf(c: ConditionedWaveform, lMax: number | null): Finding[] {
  const { content } = c.used(lMax);
  return recordFindings(c.given, (l, m) => content.kind === 'modes' && content.modes.some((mode) => mode.l === l && mode.m === m));
}

/** Findings that do not stop, over all points, each once with the points it concerns. */
export function findingsOf(quantity: DetectorQuantity, requests: readonly PointRequest[], found: readonly Evaluated[] | null): Finding[] {
  const points = requests.map((request, i) => (found === null ? detectorPoint(request) : quantity.recipe.shownPoint(request, found[i]!)));
  const first = requests[0]!;
  const level = first.traits.loudness ? 'worth-a-look' : 'needs-answer';
  const perWaveform = roleWaveforms(first).flatMap((c) => {
    const affected = points.map((point, i) => ({ point, side: sideIn(point, requests[i]!, c) }));
    return [
      look.negativeMAssumed(c),
      look.modesMissing(c),
      ...(first.traits.joined ? [] : [look.signalStartsInBand(c, affected, level), look.taperRoom(c, affected)]),
      look.bandBeyondSampling(c, affected),
      look.ringBeyondSampling(c, affected),
      ...recordsOf(c, points[0]!.declared.lMax ?? null),
    ];
  });
  const roots = (found ?? []).map((here, i) =>
    look.severalRoots(requests[i]!.a.given.name, first.traits.horizon && requests[i]!.b === null ? (here.roots ?? []) : []),
  );
  const own = requests.flatMap((request) => quantity.recipe.looks?.(request) ?? []);
  return distinct([...perWaveform, ...roots, ...own].filter((finding) => finding !== null));
}
