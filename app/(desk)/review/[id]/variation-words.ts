import type { VariationView } from '@/lib/services/variations/variation-view';

/** Only what was changed, as a reader would say it: `lower edge 30 Hz, curve G2`. */
export function changesInWords({ fLowHz, fHighHz, totalMassMsun, noise }: VariationView['changes']): string {
  return [
    fLowHz === undefined ? null : `lower edge ${fLowHz} Hz`,
    fHighHz === undefined ? null : `upper edge ${fHighHz} Hz`,
    totalMassMsun === undefined ? null : `total mass ${totalMassMsun} M⊙`,
    noise === undefined ? null : `noise curve ${'curve' in noise ? noise.curve : noise.named}`,
  ].filter((words) => words !== null).join(', ');
}
