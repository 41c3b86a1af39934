import { LEAST, ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { short } from '../findings/spelt';
import { relativeSlip } from '../radiation/input-rounding';
import { isFinding, measureTones, type ToneRecipe } from '../tones/measure-tones';
import { toneSampling } from '../tones/tone-findings';
import { toneName } from '../tones/tone';
import { usedSettings } from '../tones/used-rows';
import { mirrorOnPanels, mirrorOnSamples, type Likeness, type MirrorWindow } from './mirror-by-routes';
import { mirrorFigure } from './mirror-figure';
import { mirrorPoint, mirrorWindow, peaksOnSamples, peaksOnSplines, type MirrorPoint } from './mirror-point';

type Window = MirrorWindow & { readonly peakM: number; readonly cut: boolean };

/** E15: each edge of the window moved by a fifth of its length. */
const MOVED = [-0.2, 0, 0.2];

const windowA = (point: MirrorPoint): Window | Finding => mirrorWindow(point, peaksOnSamples(point));

function found(window: Window | Finding): Window {
  if (isFinding(window)) throw new Error(window.text);
  return window;
}

const likenessA = (point: MirrorPoint): Likeness => mirrorOnSamples(point.em, point.gw.A, found(windowA(point)));

function byRouteB(point: MirrorPoint): number {
  const window = mirrorWindow(point, peaksOnSplines(point));
  return isFinding(window) ? Number.NaN : mirrorOnPanels(point.em, point.gw.B, window).spread;
}

function computation(point: MirrorPoint): BudgetLine[] {
  const window = found(windowA(point));
  const { spread } = likenessA(point);
  const other = mirrorWindow(point, peaksOnSamples(point, 'parabola'));
  const byPeak = isFinding(other) ? Number.NaN : Math.abs(mirrorOnSamples(point.em, point.gw.A, other).spread - spread);
  const byOrder = Math.abs(mirrorOnSamples(point.em, point.gw.A, window, 6).spread - spread);
  const byStencil = Math.abs(mirrorOnSamples(point.em, point.gw.coarse, window).spread - spread);
  const slips = [point.emWaveform, point.gwWaveform].map(({ significantDigits: digits }) => (digits === null ? 0 : relativeSlip(digits)));
  const differentiated = point.gw.A !== point.gw.coarse;
  return [
    { component: 'Interpolation, sums and time of the peaks', id: 'E01', group: 'computation', u: Math.max((byPeak + byOrder) / ROOT3, LEAST), note: 'Local polynomials of order 8 against 6, peaks by a polynomial against the five-sample parabola; changes added, half-width over √3.' },
    ...(differentiated ? [{ component: 'Differentiation', id: 'E02', group: 'computation', u: Math.max(byStencil / ROOT3, LEAST), note: '13-point against 9-point differences.' } as const] : []),
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: Math.hypot(slips[0]!, slips[1]! * point.gw.gain(window.from, window.to)), note: 'Last printed digits of both files, where they weigh most in the window.' },
  ];
}

function coverage(point: MirrorPoint): BudgetLine[] {
  const [t1, t2] = point.windowM;
  const length = t2 - t1;
  const values = MOVED.flatMap((a) => MOVED.map((b) => ({ ...point, windowM: [t1 + a * length, t2 + b * length] as const }))).flatMap((moved) => {
    const window = windowA(moved);
    return isFinding(window) || window.cut ? [] : [mirrorOnSamples(moved.em, moved.gw.A, window).spread];
  });
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const spread = values.length < 2 ? null : Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return [
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
    { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
    {
      component: 'Choice of the window', id: 'E15', group: 'coverage', u: spread, ...(spread === null ? {} : { degreesOfFreedom: values.length - 1 }),
      note: spread === null ? 'The records are too short to move the edges of the window.' : `Edges moved by a fifth of the window: standard deviation of the ${values.length} windows inside both records.`,
    },
  ];
}

function findingsOf(point: MirrorPoint): Finding[] {
  const { peakM, from, to, cut } = found(windowA(point));
  const names = `${point.emWaveform.name}, ${point.gwWaveform.name}`;
  const [t1, t2] = point.windowM;
  const made = { code: 'engine/negative-m-assumed', level: 'needs-answer', where: point.gwWaveform.name, text: `In ${point.gwWaveform.name} ${toneName(point)} is absent and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane.`, fix: 'Declare negativeM: mirror, given or none.' } as const;
  const clipped = { code: 'engine/short-window', level: 'worth-a-look', where: names, text: `The records share ${short(from - peakM)} to ${short(to - peakM)} M around the peak of the window from ${t1} to ${t2} M; the ratio is taken there.`, fix: 'Supply longer records, or declare a window inside both.' } as const;
  return [...(point.mirrored ? [made] : []), ...toneSampling(point.em, point.emWaveform.name), ...toneSampling(point.gw.B, point.gwWaveform.name), ...(cut ? [clipped] : [])];
}

function recipeOf(request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<MirrorPoint> {
  return {
    byRouteA: (point) => {
      const window = windowA(point);
      if (isFinding(window)) return window;
      const { spread, meanRatio, phaseRms } = mirrorOnSamples(point.em, point.gw.A, window);
      return { value: spread, components: { meanRatio, phaseRms } };
    },
    byRouteB, computation, coverage,
    findings: findingsOf,
    settings: (point) => usedSettings([{ name: 'modes', value: [point.mode], matters: point.severalModes }, { name: 'window', value: point.windowM, unit: 'M', matters: true }], request),
    figures: (point): Figure[] => [mirrorFigure(point, found(windowA(point)), likenessA(point).meanRatio)],
    tolerance,
  };
}

/**
 * Measures how constant the ratio of φ₂ to ψ₄ is around the merger.
 * Shape:  see Measurement.
 * Units:  a share of the mean ratio.
 * Error:  see computation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q27; settings.md section 7.
 */
export const measureMirroring =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement =>
    measureTones(request, watch, [{}], [mirrorPoint(request)], recipeOf(request, tolerance));
