import type { BudgetLine, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import type { RingdownLine } from '../ringdown/line-on-samples';
import { ringdownComputation, ringdownCoverage } from '../ringdown/ringdown-budget';
import { ringdownFigure } from '../ringdown/ringdown-figure';
import { ringdownFindings } from '../ringdown/ringdown-findings';
import { lineByRouteA, lineByRouteB, ringdownPreparer, type FitWindow, type RingdownPoint } from '../ringdown/ringdown-point';
import { isFinding, measureTones, stop, type At, type ToneRecipe } from '../tones/measure-tones';
import { toneName } from '../tones/tone';
import { floorRows, highestRows, mirrorRows, usedSettings } from '../tones/used-rows';
import type { RemnantNumber } from './balance-recipe';
import { tabulatedModes, type TabulatedMode } from './quasi-normal';
import { kerrFromTone } from './ringdown-inversion';

const tabulated = ([l, m]: RingdownPoint['settings']['mode']): TabulatedMode | undefined => tabulatedModes.find((known) => known === `${l}${Math.abs(m)}`);

const readBy = (which: RemnantNumber, mode: TabulatedMode, route: 'A' | 'B') => (line: RingdownLine): number => kerrFromTone(mode, line, route)?.[which] ?? Number.NaN;

interface Found {
  readonly window: FitWindow;
  readonly line: RingdownLine;
}

/** The two slopes scatter alike and independently; a step of that size in each is carried through the inversion. */
function rounding(line: BudgetLine, scale: number, { line: { omega, gamma } }: Found, read: (line: RingdownLine) => number): BudgetLine {
  const slip = (line.u ?? Number.NaN) / scale;
  const here = read({ omega, gamma });
  return { ...line, u: Math.hypot(read({ omega: omega + slip, gamma }) - here, read({ omega, gamma: gamma + slip }) - here) };
}

function recipeOf(which: RemnantNumber, request: MeasureRequest): ToneRecipe<RingdownPoint> {
  const known = new Map<RingdownPoint, Found>();
  const foundAt = (point: RingdownPoint): Found => known.get(point)!;
  const reads = (point: RingdownPoint): ((line: RingdownLine) => number) => readBy(which, tabulated(point.settings.mode)!, 'A');
  return {
    byRouteA: (point) => {
      const { name } = point.completed.waveform;
      const mode = tabulated(point.settings.mode);
      if (mode === undefined) return stop('engine/no-signal', name, `The frequencies of ${toneName(point.settings)} of a Kerr hole are not tabulated here, so its ringing gives no remnant.`, 'List one of (2,2), (2,1), (3,3), (3,2) and (4,4) in modes.');
      const entry = lineByRouteA(point);
      if (isFinding(entry)) return entry;
      const value = readBy(which, mode, 'A')(entry.line);
      if (!Number.isFinite(value)) return stop('engine/no-signal', name, `${toneName(point.settings)} of ${name} turns at ${Number(entry.line.omega.toPrecision(4))} and decays at ${Number(entry.line.gamma.toPrecision(4))} rad/M, which no Kerr hole with a spin from −0.2 to 0.97 does.`, 'Declare a window in the ringdown.');
      known.set(point, entry);
      return { value, components: { start: null, radiated: null, checkRingdown: value } };
    },
    byRouteB: (point) => readBy(which, tabulated(point.settings.mode)!, 'B')(lineByRouteB(point)),
    computation: (point, { value }) => ringdownComputation(point, foundAt(point).window, value, reads(point)).map((line) => (line.id === 'rounding' ? rounding(line, point.scale, foundAt(point), reads(point)) : line)),
    coverage: (point) => ringdownCoverage(point, foundAt(point).window, reads(point)),
    findings: (point) => ringdownFindings(point, foundAt(point).window, foundAt(point).line),
    settings: ({ settings, record, completed, tones, startM }) =>
      usedSettings(
        [{ name: 'method', value: 'ringdown', matters: true }, { name: 'modes', value: [settings.mode], matters: record.modes.length > 1 }, ...highestRows(settings.lMax), { name: 'window', value: settings.window, unit: 'M', matters: true }, ...floorRows(tones.floor, startM, request), ...mirrorRows(completed, [{ m: settings.mode[1] }])],
        request,
      ),
    figures: (point) => [ringdownFigure(point.tones.A, foundAt(point).window, foundAt(point).line, `Ringdown of ${toneName(point.settings)} of ${point.completed.waveform.name}`)],
    tolerance: () => 1,
  };
}

/**
 * Mass or spin of the hole that rings as this mode does (Q16, method `ringdown`).
 * Shape:  see Measurement.
 * Units:  mass in M, spin dimensionless.
 * Error:  of the two lines, carried through the inversion; that of the table is 4e-5 for spins above 0.4.
 * Fails:  notComputable with the findings that say why.
 * Source: Q18; settings.md section 5.
 */
export function remnantByRingdown(which: RemnantNumber, request: MeasureRequest, watch: Watch): Measurement {
  const { over } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  return measureTones(request, watch, ats, ats.map(ringdownPreparer(request)), recipeOf(which, request));
}
