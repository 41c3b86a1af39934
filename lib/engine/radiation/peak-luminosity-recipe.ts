import type { Finding } from '../contract/finding';
import { houseValues } from '../contract/house-values';
import { LUMINOSITY_ERG_PER_S } from '../units/constants';
import { ENERGY_FACTOR, type ModeEnergy } from './energy-on-samples';
import { sharesByEll } from './energy-recipe';
import { energyFigure, modesFigure } from './flux-figure';
import { peakOnPanels, peakOnSamples, type FluxPeak } from './flux-peak';
import { relativeSlip } from './input-rounding';
import { squared } from './news-on-samples';
import { radiationOnPanels } from './news-on-panels';
import type { PreparedPoint } from './prepare-radiated';
import { missingModesFindings, negativeModesFinding } from './radiation-findings';
import { house, NO_FLOOR, sampledAs, type FindingContext, type Outcome, type RadiationRecipe, type SampledStore } from './radiation-recipe';
import { listedButMissing, restrictsModes } from './used-modes';

function outcomeOf({ timeM, flux, atEdge }: FluxPeak): Outcome {
  const components = { timeM, ergPerS: flux * LUMINOSITY_ERG_PER_S };
  return { value: flux, vector: [flux], components, ...(atEdge ? { remarks: ['lower bound only'] } : {}) };
}

/** The sample nearest to the peak. */
function nearest(axis: Float64Array, timeM: number): number {
  const after = axis.findIndex((t) => t >= timeM);
  if (after <= 0) return after < 0 ? axis.length - 1 : 0;
  return axis[after]! - timeM < timeM - axis[after - 1]! ? after : after - 1;
}

const timeOf = ({ components }: Outcome): number => components.timeM ?? Number.NaN;

/** Slips of Ḣ at the peak, independent from mode to mode; news and ψ4 carry them as a common relative error. */
function rounding(point: PreparedPoint, store: SampledStore, digits: number | null, outcome: Outcome): number {
  if (digits === null) return 0;
  const relative = relativeSlip(digits);
  const { axis, news, noiseGain } = sampledAs(store, point, house);
  if (noiseGain === null) return 2 * relative * Math.abs(outcome.value);
  const i = nearest(axis, timeOf(outcome));
  let [variance, bias] = [0, 0];
  point.record.modes.forEach(({ re, im }, k) => {
    const slip = relative * Math.hypot(re[i]!, im[i]!) * noiseGain[i]!;
    variance += (2 * ENERGY_FACTOR * Math.hypot(news[k]!.re[i]!, news[k]!.im[i]!) * slip) ** 2;
    bias += 2 * ENERGY_FACTOR * slip * slip;
  });
  return Math.sqrt(variance) + bias;
}

function atPeak(point: PreparedPoint, store: SampledStore, outcome: Outcome): ModeEnergy[] {
  const { axis, news } = sampledAs(store, point, house);
  const i = nearest(axis, timeOf(outcome));
  return news.map((mode) => ({ l: mode.l, m: mode.m, energy: ENERGY_FACTOR * squared({ ...mode, re: mode.re.subarray(i, i + 1), im: mode.im.subarray(i, i + 1) })[0]! }));
}

function edgeFinding({ completed, outcome }: FindingContext): Finding[] {
  if (outcome.remarks === undefined) return [];
  const { name } = completed.waveform;
  const time = Number(timeOf(outcome).toPrecision(6));
  return [
    {
      code: 'engine/peak-at-edge',
      level: 'worth-a-look',
      where: name,
      text: `The flux of ${name} is largest at t = ${time} M, where the interval ends or begins: the peak itself may lie outside, and the number is a lower bound.`,
      fix: 'Supply the record through the merger, or declare an earlier startM.',
    },
  ];
}

/** Peak luminosity (Q15). */
export const peakLuminosityRecipe: RadiationRecipe = {
  noun: 'luminosity',
  article: 'A',
  settings: ['modes', 'lMax', 'startM', 'integrationFloor'],
  normaliseBy: houseValues.normaliseBy,
  withStrain: false,
  atOneTime: true,
  byRouteA: (point, store, turned) => outcomeOf(peakOnSamples(sampledAs(store, point, turned), point.settings.startM, turned.order)),
  byRouteB: ({ record, settings: { startM, floor } }) => outcomeOf(peakOnPanels(radiationOnPanels(record, startM, floor ?? NO_FLOOR, false), startM, record.axis)),
  rounding,
  shares: (point, store, outcome) => sharesByEll(atPeak(point, store, outcome), 1),
  findings: (context) => [
    ...edgeFinding(context),
    ...negativeModesFinding(context.completed, context.completed.waveform.name, '; without them the luminosity would be half'),
    ...missingModesFindings(context.completed, listedButMissing(context.completed, context.point), restrictsModes(context.point), 'luminosity', 'Higher modes add to it too.'),
  ],
  figures: (point, store, name) => [energyFigure(sampledAs(store, point, house), point.settings.startM, name), ...modesFigure(sampledAs(store, point, house), point.settings.startM, name)],
};
