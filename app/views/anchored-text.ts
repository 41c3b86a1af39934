import { formatWithUncertainty } from '@/app/_ui/math/format-uncertainty';
import type { AnchoredNumber } from '@/lib/reviews/anchors';

/** A claim of several numbers has no printed one of its own; a thread of an earlier version kept no uncertainty, and says *unknown*. */
export const anchoredText = ({ printed, value, expandedUncertainty = null, unit = '' }: AnchoredNumber): string =>
  printed === null ? 'several numbers' : formatWithUncertainty(value, expandedUncertainty, unit);
