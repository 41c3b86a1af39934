import { detectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';

/**
 * A search over mass, shift and azimuth of b for each of hundreds of sights of a has no end that anybody would wait for.
 * Shape:  one finding or null.
 * Units:  none.
 * Error:  none.
 * Fails:  never.
 * Source: our bound on the cost of a claim.
 */
export function sightStops(request: PointRequest): (Finding | null)[] {
  const { response, maximise } = detectorPoint(request);
  if (response !== 'complex' || !maximise.includes('templateMass')) return [null];
  return [
    {
      code: 'engine/search-too-wide',
      level: 'stops-lodging',
      where: 'maximise',
      text: 'With both polarisations, the template’s mass is not searched for every line of sight: that would be hundreds of searches over mass, shift and azimuth.',
      fix: 'Leave out "templateMass", or claim a match at one line of sight.',
    },
  ];
}
