import { houseValues } from '@/lib/engine/contract/house-values';
import { detectorPoint, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import type { Band } from '@/lib/engine/contract/route';
import { joinInTaper } from '@/lib/engine/findings/join-findings';
import { inspiralAmplitude, type InspiralAmplitude } from '@/lib/engine/inspiral/post-newtonian-amplitude';
import { joinFigure } from './join-figure';
import { loudness } from './loudness';
import { ROUNDING_FLOOR, type Evaluated, type OwnBudget, type Recipe, type RouteKit } from './recipe';
import { ROOT3 } from '../../budget/half-width';

/** Half the width of the band, as a part of the join, in which the two amplitudes are compared. */
const BESIDE = 1e-4;
const MOVED_JOINS = [0.8, 1.2];

/** The claim's or the file's own; the claim is refused where neither is known. */
function inspiralOf(request: PointRequest, { massMsun, redshift, distanceMpc, declared }: DetectorPoint): InspiralAmplitude {
  const { given } = request.a;
  return inspiralAmplitude({
    massMsun: (massMsun ?? given.ownTotalMassMsun ?? Number.NaN) * (1 + redshift),
    distanceMpc: distanceMpc ?? given.ownDistanceMpc ?? Number.NaN,
    massRatio: declared.massRatio ?? given.binary.massRatio ?? Number.NaN,
    order: declared.amplitudeOrder ?? houseValues.amplitudeOrder,
  });
}

interface Joined {
  readonly point: DetectorPoint;
  readonly amplitude: InspiralAmplitude;
  readonly below: Band;
  readonly above: Band;
}

/** A join outside the band leaves one of its sides empty. */
function joinedAt(request: PointRequest): Joined {
  const point = detectorPoint(request);
  const { band, declared } = point;
  const joinHz = Math.min(Math.max(declared.joinHz ?? Number.NaN, band.fLowHz), band.fHighHz);
  return { point, amplitude: inspiralOf(request, point), below: { ...band, fHighHz: joinHz }, above: { ...band, fLowHz: joinHz } };
}

const isEmpty = ({ fLowHz, fHighHz }: Band): boolean => !(fHighHz > fLowHz);

function rhosOf({ route }: RouteKit, { point, amplitude, below, above }: Joined): { rhoBelow: number; rhoAbove: number } {
  const seen = Math.sqrt(point.detectors) * Math.sin((point.armAngleDeg * Math.PI) / 180);
  return {
    rhoBelow: isEmpty(below) ? 0 : seen * Math.sqrt(route.powerOf(amplitude, below)),
    rhoAbove: isEmpty(above) ? 0 : loudness(route, point.a, { ...point, band: above }),
  };
}

/** Numerical over post-Newtonian amplitude around the join; null where the join stands on neither. */
function ratioAtJoin({ route }: RouteKit, { point, amplitude }: Joined): number | null {
  const { band, declared, a, response } = point;
  const joinHz = declared.joinHz ?? Number.NaN;
  const around = { ...band, fLowHz: Math.max(band.fLowHz, joinHz * (1 - BESIDE)), fHighHz: Math.min(band.fHighHz, joinHz * (1 + BESIDE)) };
  if (isEmpty(around)) return null;
  const one = { ...point, band: around, detectors: 1, armAngleDeg: 90, response };
  return loudness(route, a, one) / Math.sqrt(route.powerOf(amplitude, around));
}

/** The numerical part of a hybrid is face-on and plus; a claim that says otherwise means another number. */
function faceOnStops(request: PointRequest): (Finding | null)[] {
  const { declared } = request;
  const turned = declared.inclinationRad !== undefined && declared.inclinationRad !== houseValues.inclinationRad;
  const other = declared.response !== undefined && declared.response !== 'plus';
  const averaged = declared.average !== undefined && declared.average !== 'optimal';
  if (!turned && !other && !averaged) return [null];
  const what = turned ? `the inclination ${declared.inclinationRad} rad` : other ? 'another response than plus' : `the average "${declared.average}"`;
  return [
    {
      code: 'engine/hybrid-face-on',
      level: 'stops-lodging',
      where: turned ? 'inclinationRad' : other ? 'response' : 'average',
      text: `A hybrid loudness is that of a binary seen face-on in the plus polarisation: the amplitude below the join is known there alone. The claim asks for ${what}.`,
      fix: 'Leave the setting out, or claim the loudness of a waveform that fills the band.',
    },
  ];
}

function inspiralLine({ request, found, movedBy }: OwnBudget): BudgetLine {
  const { declared } = request;
  const order = declared.amplitudeOrder ?? houseValues.amplitudeOrder;
  const joins = MOVED_JOINS.map((factor) => movedBy({ joinHz: (declared.joinHz ?? Number.NaN) * factor }));
  const moves = [...joins, movedBy({ amplitudeOrder: 1 - order })];
  const widest = Math.max(...moves.map(Math.abs));
  const told = moves.map((x) => `${((100 * x) / found.value).toFixed(2).replace('-', '−')} %`);
  return {
    component: 'Post-Newtonian part',
    id: 'E11',
    group: 'coverage',
    u: Number.isFinite(widest) ? widest / ROOT3 : null,
    note: `Join moved by −20 % and +20 %: ${told[0]}, ${told[1]}; amplitude of order ${1 - order} instead of ${order}: ${told[2]}; the largest as half-width over √3.`,
  };
}

export const hybridRecipe: Recipe = {
  traits: () => ({ maximise: null, loudness: true, absolute: true, needsDistance: true, horizon: false, joined: true }),
  requires: (waveforms, has) => [
    ...(waveforms.every((w) => w.ownTotalMassMsun !== null) || has('totalMassMsun') ? [] : (['totalMassMsun'] as const)),
    ...(waveforms.every((w) => w.ownDistanceMpc !== null) || has('distanceMpc') || has('redshift') ? [] : (['distanceMpc'] as const)),
    ...(has('joinHz') ? [] : (['joinHz'] as const)),
    ...(waveforms.every((w) => w.binary.massRatio !== undefined) || has('massRatio') ? [] : (['massRatio'] as const)),
  ],
  evaluate: (kit, request): Evaluated => {
    const joined = joinedAt(request);
    const { rhoBelow, rhoAbove } = rhosOf(kit, joined);
    return { value: Math.hypot(rhoBelow, rhoAbove), components: { rhoBelow, rhoAbove, amplitudeRatioAtJoin: ratioAtJoin(kit, joined) } };
  },
  again: (kit, request) => {
    const { rhoBelow, rhoAbove } = rhosOf(kit, joinedAt(request));
    return Math.hypot(rhoBelow, rhoAbove);
  },
  floor: (value) => ROUNDING_FLOOR * Math.abs(value),
  snrLike: false,
  stops: faceOnStops,
  looks: (request) => [joinInTaper(request.a, detectorPoint(request))],
  ownBudget: (context) => [inspiralLine(context)],
  ownFigures: ({ request, store }) => {
    const { point, amplitude } = joinedAt(request);
    return joinFigure(point, amplitude, store);
  },
  shownPoint: detectorPoint,
};
