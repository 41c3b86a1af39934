import { catalogueRows } from '@/app/(desk)/compose/[id]/catalogue-rows';
import type { QuantityRow } from '@/app/(desk)/compose/[id]/quantity-row';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { conventionById } from '@/lib/explain/conventions/conventions';
import type { OfferedReading } from '@/lib/explain/read-otherwise';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

/** What the panel needs of one claim: its quantity's settings, what is declared, the number that stands. Plain data. */
export interface VariationSource {
  readonly submissionId: string;
  readonly revision: number;
  /** Nothing of it is lodged: the number that stands is that of a check. */
  readonly isDraft: boolean;
  readonly claimId: string;
  readonly quantity: QuantityRow;
  readonly declared: Readonly<Record<string, unknown>>;
  /** The swept setting; one value of it takes the place of the sweep. */
  readonly swept: string | null;
  /** Null where no curve enters. */
  readonly noise: { readonly current: string; readonly named: readonly string[]; readonly builtIn: readonly { readonly id: string; readonly title: string }[] } | null;
  readonly unit: string;
  readonly settings: readonly UsedSetting[];
  readonly points: readonly Pick<ResultPoint, 'at' | 'value' | 'expandedUncertainty' | 'tolerance'>[];
  /** Facts beside the file of the waveform that the number is of. */
  readonly binary: BinaryFacts;
  /** How the catalogue of conventions could be read otherwise here; empty where none could. */
  readonly readings: readonly SourceReading[];
  /** Why there is none and what to do, where the base run kept none. */
  readonly withoutReadings: string | null;
}

export interface SourceReading extends OfferedReading {
  /** Of the convention. */
  readonly title: string;
}

type Loose = Readonly<Record<string, unknown>>;
const loose = (value: unknown): Loose => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Loose) : {});

interface Revision {
  readonly submissionId: string;
  readonly revision: number;
  readonly isDraft?: boolean;
  readonly sheet: Pick<DraftSheet, 'claims' | 'noise' | 'waveforms'>;
}

function binaryOf(claim: Loose, { waveforms }: Revision['sheet']): BinaryFacts {
  const name = loose(claim['of'])['a'];
  return typeof name === 'string' ? loose(loose(waveforms[name])['binary']) : {};
}

/** Undefined where the sheet holds no such claim. */
export function variationSource({ submissionId, revision, isDraft = false, sheet }: Revision, result: ResultClaim, readings: readonly OfferedReading[] = [], withoutReadings: string | null = null): VariationSource | undefined {
  const claim = sheet.claims.find((c) => c['id'] === result.id);
  const quantity = catalogueRows().find(({ id }) => id === result.quantity);
  if (!claim || !quantity) return undefined;
  const [swept] = Object.keys(loose(claim['over']));
  const curve = typeof claim['noise'] === 'string' ? claim['noise'] : null;
  return {
    submissionId,
    revision,
    isDraft,
    claimId: result.id,
    quantity,
    declared: loose(claim['settings']),
    swept: swept ?? null,
    noise: quantity.needsNoise ? { current: curve ?? '', named: Object.keys(sheet.noise).filter((name) => name !== curve), builtIn: builtInCurves.map(({ id, title }) => ({ id, title })) } : null,
    unit: result.unit,
    settings: result.settings,
    points: result.points.map(({ at, value, expandedUncertainty, tolerance }) => ({ at, value, expandedUncertainty, tolerance })),
    binary: binaryOf(claim, sheet),
    readings: readings.map((reading) => ({ ...reading, title: conventionById(reading.convention).title })),
    withoutReadings,
  };
}
