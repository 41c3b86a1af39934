/**
 * What a record shows by itself, whatever is claimed of it: V06, V10, V15, V16 and V21. Every family
 * of quantities asks once for each of its waveforms, with the modes that it uses.
 */
import { dominantMode } from '../conditioning/dominant-mode';
import type { Finding } from '../contract/finding';
import type { Waveform } from '../contract/waveform';
import { aliasingFindings } from './aliasing';
import { driftFindings } from './drift';
import { mirrorFindings, oddModeFindings } from './mode-symmetry';
import { strainUnitsFindings } from './strain-units';

/** Does the claim use this mode? */
export type Uses = (l: number, m: number) => boolean;

export const usesAll: Uses = () => true;

/** Linear in the samples; nothing is said of what has no samples in time. */
export function recordFindings(waveform: Waveform, uses: Uses = usesAll): Finding[] {
  const { content, axis, unit, name, uniformStep, domain, variable } = waveform;
  // Light of gas keeps no rhythm that a spectrum could judge.
  if (domain !== 'time' || variable === 'luminosity') return [];
  if (content.kind === 'line-of-sight') return uniformStep === null ? [] : aliasingFindings({ axis, re: content.plus, im: content.cross }, null, unit, name);
  if (content.kind !== 'modes') return [];
  const modes = content.modes.filter(({ l, m }) => uses(l, m));
  const loudest = dominantMode(modes);
  if (loudest === undefined) return [];
  const junkEnd = unit === 'M' ? waveform.junkEndM : null;
  const aliased = uniformStep === null ? [] : aliasingFindings({ axis, re: loudest.re, im: loudest.im }, loudest, unit, name);
  // What follows speaks of spin weight −2; the field that φ₂ lies in has its own symmetry.
  if (variable === 'phi2') return aliased;
  return [
    ...aliased,
    ...(variable === 'strain' ? driftFindings(axis, unit, modes, name) : []),
    ...(waveform.negativeM === 'none' ? [] : mirrorFindings(modes, name)),
    ...oddModeFindings(modes, { axis, unit, binary: waveform.binary, junkEnd }, name),
    ...(uses(2, 2) ? strainUnitsFindings(waveform) : []),
  ];
}
