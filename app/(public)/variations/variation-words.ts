import { formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import { formatNumber } from '@/app/_ui/math/format-number';
import type { VariationChanges, VariationVisibility } from '@/lib/services/variations/variation-view';

/** Only what was changed, as a reader would say it: `lower cut-off 30 Hz, noise curve G2, as if the series is taken for ψ₄`. */
export function changesInWords({ settings = {}, noise, readings = [], mask }: VariationChanges): string {
  const words = Object.entries(settings).map(([name, value]) => `${settingLabel(name).replace(/^[A-Z](?=[a-z])/, (c) => c.toLowerCase())} ${value === null ? 'not declared' : formatSetting(name, value)}`);
  return [...words, ...(noise === undefined ? [] : [`noise curve ${noiseInWords(noise)}`]), ...readings.map(({ clause }) => `as if ${clause}`), ...(mask ? [maskInWords(mask)] : [])].join(', ');
}

export const maskInWords = ({ from, to }: NonNullable<VariationChanges['mask']>): string => `without ${formatNumber(from)} to ${formatNumber(to)} of the files’ time`;

export const noiseInWords = (noise: NonNullable<VariationChanges['noise']>): string => ('curve' in noise ? `${noise.curve}, built in` : `${noise.named}, from the sheet`);

export const SEEN_BY: Readonly<Record<VariationVisibility, string>> = { private: 'you alone', comment: 'readers of the comment', link: 'whoever has the link' };

const apartWords = (times: number): string => (Math.abs(times) >= 100 ? times.toFixed(0) : Math.abs(times) >= 10 ? times.toFixed(1) : times.toFixed(2));

/** `−3.40 T`; what has no tolerance says so. */
export function inTolerancesText(times: number | null): string {
  if (times === null) return 'no tolerance to measure by';
  if (times === 0) return '0 T';
  if (Math.abs(times) < 0.005) return 'less than 0.01 T';
  return `${times > 0 ? '+' : '−'}${apartWords(Math.abs(times))} T`;
}
