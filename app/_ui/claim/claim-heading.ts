import type { Quantity } from '@/lib/engine/contract/quantity';
import type { ResultClaim } from '@/lib/pipeline/result';
import type { ClaimHeading } from './record-view';
import { formatAt, formatSetting } from './setting-names';
import type { Place } from '@/lib/kernel/place';

type QuantityWords = Pick<Quantity, 'title' | 'formula' | 'scale'>;

interface SheetWords {
  readonly of?: Readonly<Record<string, unknown>>;
  readonly noise?: string | null;
  readonly quote?: string | null;
  readonly files?: readonly string[];
  readonly waveforms?: ClaimHeading['waveforms'];
  readonly noiseSource?: ClaimHeading['noiseSource'];
}

const named = (of: SheetWords['of']): string => {
  const names = Object.values(of ?? {}).filter((v): v is string => typeof v === 'string');
  return names.length === 0 ? '' : ` of ${names.length === 1 ? names[0] : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`}`;
};

function contextOf(claim: Omit<ResultClaim, 'candidates'>, noise: string | null | undefined): string | null {
  const setting = (name: string) => claim.settings.find((s) => s.name === name);
  const low = setting('fLowHz');
  const distance = setting('distanceMpc');
  const parts = [
    noise ? `curve ${noise}` : null,
    low ? `from ${formatSetting('fLowHz', low.value)}` : null,
    distance && distance.standing !== 'swept' ? `at ${formatSetting('distanceMpc', distance.value)}` : null,
  ].filter((part) => part !== null);
  return parts.length > 0 ? parts.join(', ') : null;
}

/** The heading of a claim that has been run; `sheet` adds what only the claim sheet knows. */
export function headingOf(claim: Omit<ResultClaim, 'candidates'>, quantity: QuantityWords | null, sheet: SheetWords = {}): ClaimHeading {
  return {
    id: claim.id,
    quantity: claim.quantity,
    title: `${quantity?.title ?? claim.quantity}${named(sheet.of)}`,
    context: contextOf(claim, sheet.noise),
    unit: claim.unit,
    scale: quantity?.scale ?? 'absolute',
    formula: quantity?.formula ?? null,
    methodHref: `/methods/${claim.quantity}`,
    quote: sheet.quote ?? null,
    points: claim.points.map((point) => ({ at: point.at, printed: point.printed, tolerance: point.tolerance })),
    files: sheet.files,
    waveforms: sheet.waveforms,
    noiseSource: sheet.noiseSource,
  };
}

/** Where a single value stands: the total mass it was computed at, or nothing to say. */
export function placeOf(claim: ResultClaim | undefined, at: Place): string | null {
  if (Object.keys(at).length > 0) return formatAt(at);
  const mass = claim?.settings.find((setting) => setting.name === 'totalMassMsun');
  return typeof mass?.value === 'number' ? formatSetting('totalMassMsun', mass.value) : null;
}
