import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';
import { startFrequency } from './detector-findings';
import { short } from './spelt';

/**
 * Where a hybrid takes the numerical amplitude before the taper has let it in.
 * Shape:  one finding or null.
 * Units:  Hz in the words.
 * Error:  the frequency where the ramp ends is that of one cycle around it.
 * Fails:  never; a quiet start has no ramp.
 * Source: settings.md section 4 (Q22): the join lies below f at t_r.
 */
export function joinInTaper(c: ConditionedWaveform, point: DetectorPoint): Finding | null {
  const start = startFrequency(c, point);
  const joinHz = Math.max(point.declared.joinHz ?? Number.NaN, point.band.fLowHz);
  if (start === null || !(joinHz < start / point.a.secondsPerUnit)) return null;
  const startHz = start / point.a.secondsPerUnit;
  return {
    code: 'engine/join-in-taper',
    level: 'worth-a-look',
    where: c.given.name,
    text: `The numerical amplitude is taken from ${short(joinHz, 6)} Hz on, but ${c.given.name} has come in fully only at ${short(startHz)} Hz: between them the taper makes it too small.`,
    fix: `Join at ${short(startHz)} Hz or above, or attach a waveform that starts earlier.`,
  };
}
