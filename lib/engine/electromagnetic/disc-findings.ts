import type { Finding } from '../contract/finding';
import { scientific, short } from '../findings/spelt';
import { accretionErgPerS, coolingS, dynamicalS, eddingtonErgPerS, type DiscPoint } from './disc-point';

/** A luminosity and an accretion rate further apart than this do not belong together. */
const FACTOR = 2;

function cooling({ waveform, declared, peak, totalMassMsun }: DiscPoint): Finding[] {
  const [cool, move] = [coolingS(declared, peak.value), dynamicalS(declared, totalMassMsun)];
  if (cool === null || move === null || cool >= move) return [];
  return [
    {
      code: 'engine/cools-at-once', level: 'worth-a-look', where: waveform.name,
      text: `At its peak ${waveform.name} would radiate the declared internal energy in ${scientific(cool)} s, less than the ${scientific(move)} s in which gas at ${declared.radiusM} M moves: the energy would be gone before the gas moves once. The emission rule contradicts its own assumptions.`,
      fix: 'Treat the gas as optically thick, let it cool in the simulation, or claim the luminosity as an upper bound.',
    },
  ];
}

function accretion({ waveform, declared, peak }: DiscPoint): Finding[] {
  const expected = accretionErgPerS(declared);
  if (expected === null || Math.abs(Math.log(peak.value / expected)) <= Math.log(FACTOR)) return [];
  return [
    {
      code: 'engine/accretion-balance', level: 'worth-a-look', where: waveform.name,
      text: `The declared accretion rate and efficiency give ${scientific(expected)} erg/s; the curve peaks at ${scientific(peak.value)} erg/s, ×${short(peak.value / expected)} of that.`,
      fix: 'Check accretionRateMsunPerYear and radiativeEfficiency, or say where the rest of the energy comes from.',
    },
  ];
}

function eddington({ waveform, peak, totalMassMsun }: DiscPoint): Finding[] {
  const over = peak.value / eddingtonErgPerS(totalMassMsun);
  if (over <= 1) return [];
  return [{ code: 'engine/above-eddington', level: 'note', where: waveform.name, text: `The curve peaks at ${short(over)} times the Eddington luminosity of ${scientific(totalMassMsun)} M☉: its own light would drive the gas away.`, fix: 'Say how the gas is held.' }];
}

function edge({ waveform, peak }: DiscPoint): Finding[] {
  if (peak.atEdge === null) return [];
  return [{ code: 'engine/peak-at-edge', level: 'worth-a-look', where: waveform.name, text: `${waveform.name} is brightest where the record ${peak.atEdge === 'start' ? 'begins' : 'ends'}, at t = ${short(peak.t, 6)} ${waveform.unit}: the peak itself may lie outside, and the number is a lower bound.`, fix: 'Supply the curve around its peak.' }];
}

/**
 * Whether a curve keeps its own assumptions: its cooling time, its accretion, Eddington's bound.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  erg/s and s.
 * Error:  none: thresholds only.
 * Fails:  never; what is not declared is not judged.
 * Source: domain reference Q28.
 */
export const discFindings = (point: DiscPoint): Finding[] => [...edge(point), ...cooling(point), ...accretion(point), ...eddington(point)];
