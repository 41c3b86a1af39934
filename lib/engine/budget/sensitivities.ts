import type { Measurement, UsedSetting } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { Sensitivity } from '../contract/sensitivity';
import type { Waveform } from '../contract/waveform';
import { waveformsOf } from './relatives';
import type { Change, Rerun } from './rerun';
import { stepsOf } from './setting-steps';
import type { SweptValue } from '@/lib/kernel/place';

/** Ten times what one number costs with its two routes, its error bar and its budget, counted in single computations by route A. */
const MOST_RERUNS = 120;
/** A maximum over the phase of both polarisations at once is a search over azimuths: as dear as all of that. */
const OF_A_SEARCH = 120;
/** Samples of all modes that may be gone through altogether; counted, because a clock would not count the same twice. */
const MOST_SAMPLES = 4e8;

const samplesIn = ({ axis, content }: Waveform): number => axis.length * (content.kind === 'modes' ? content.modes.length : 2);

const affordable = (waveforms: readonly Waveform[]): number => Math.min(MOST_RERUNS, Math.floor(MOST_SAMPLES / Math.max(1, waveforms.reduce((sum, w) => sum + samplesIn(w), 0))));

interface Standing {
  readonly request: MeasureRequest;
  readonly measurement: Measurement;
  readonly index: number;
  readonly here: number;
  readonly rerun: Rerun;
}

function costOf(setting: string, tried: unknown, { settings }: Measurement): number {
  const maximised = settings.find(({ name }) => name === 'maximise')?.value;
  return setting === 'response' && tried === 'complex' && Array.isArray(maximised) && maximised.includes('phase') ? OF_A_SEARCH : 1;
}

/** The value that a setting had at this point, of a sweep too. */
function usedHere({ name, value }: UsedSetting, { request: { over }, measurement, index }: Standing): unknown {
  if (over?.setting === name) return over.values[index];
  return measurement.points[index]?.settings?.[name] ?? value;
}

const isSwept = (tried: unknown): tried is SweptValue => typeof tried === 'number' || typeof tried === 'string';

function changeTo(setting: string, tried: unknown, { over }: MeasureRequest): Change {
  if (setting === 'negativeM') return { waveform: (given) => ({ ...given, negativeM: tried as Waveform['negativeM'] }) };
  if (over?.setting === setting && isSwept(tried)) return { swept: tried };
  return { settings: { [setting]: tried } };
}

/** A swept setting can only be put at another number or word of its own kind. */
const canTry = (setting: string, tried: unknown, { over }: MeasureRequest): boolean => over?.setting !== setting || isSwept(tried);

/**
 * Every setting in use put elsewhere, one at a time: what the number at the worst point then is.
 * Shape:  one row a setting and value tried, in the order of the settings.
 * Units:  the quantity's.
 * Error:  route A's.
 * Fails:  a row without a value says why; beyond the number of computations that is allowed the rest is not tried, and says so.
 * Source: settings.md: settings taken as exact contribute nothing, and what they weigh is printed.
 */
export function sensitivitiesOf(standing: Standing): Sensitivity[] {
  const { request, measurement, here, rerun } = standing;
  let left = affordable(waveformsOf(request.inputs));
  const rows: Sensitivity[] = [];
  for (const used of measurement.settings) {
    const now = usedHere(used, standing);
    for (const tried of stepsOf(used.name, now)) {
      if (!canTry(used.name, tried, request)) continue;
      const head = { setting: used.name, standing: used.standing, ...(used.unit === undefined ? {} : { unit: used.unit }), used: now, tried };
      const cost = costOf(used.name, tried, measurement);
      const isTried = cost < left;
      const value = isTried ? rerun(changeTo(used.name, tried, request)) : null;
      const because = isTried ? 'cannot be computed so' : 'not tried: it would cost more than ten times the claim itself';
      if (isTried) left -= cost;
      rows.push(value === null ? { ...head, value, change: null, because } : { ...head, value, change: value - here });
    }
  }
  return rows;
}
