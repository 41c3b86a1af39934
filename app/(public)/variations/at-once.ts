import type { UsedSetting } from '@/lib/engine/contract/measurement';
import { settingFactor, type FactorFacts } from '@/lib/explain/setting-factor';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import type { OfferedReading } from '@/lib/explain/read-otherwise';
import type { ResultPoint } from '@/lib/pipeline/result';
import type { AskedChanges } from '@/lib/services/variations/changes';
import type { Place } from '@/lib/kernel/place';

/** A number that follows from the official one by a factor alone, without any rerun. */
export interface AtOncePoint {
  readonly at: Place;
  readonly value: number | null;
  readonly expandedUncertainty: number | null;
  readonly official: number | null;
}
export interface AtOnce {
  /** One for all points, or null where it differs from point to point. */
  readonly factor: number | null;
  readonly points: readonly AtOncePoint[];
}

/** The number that stands, with what decides whether a change is a factor on it. */
interface Official {
  readonly quantity: string;
  readonly settings: readonly UsedSetting[];
  readonly points: readonly Pick<ResultPoint, 'at' | 'value' | 'expandedUncertainty'>[];
  readonly binary?: BinaryFacts;
  readonly readings?: readonly Pick<OfferedReading, 'id' | 'factor'>[];
}

/** Of the changes one by one; null where one of them is more than a factor. */
function factorsOf(official: Official, { settings = {}, readings = [], noise, mask }: AskedChanges): readonly (number | readonly number[])[] | null {
  const changed = Object.entries(settings);
  // A reading's factor may hang on a setting, so the two together are left to a rerun.
  if (noise !== undefined || mask !== undefined || (changed.length > 0) === (readings.length > 0)) return null;
  const facts: FactorFacts = { quantity: official.quantity, used: (name) => official.settings.find((setting) => setting.name === name), binary: official.binary ?? {} };
  const found = [...changed.map(([name, to]) => settingFactor(facts, name, to)), ...readings.map((id) => official.readings?.find((reading) => reading.id === id)?.factor ?? null)];
  return found.includes(null) ? null : found.filter((factor) => factor !== null);
}

/** The varied number at once, where every change is a factor on it; else null, and only a rerun can tell. */
export function atOnce(official: Official, changes: AskedChanges): AtOnce | null {
  const factors = factorsOf(official, changes);
  if (factors === null) return null;
  const at = (i: number): number => factors.reduce<number>((all, k) => all * (typeof k === 'number' ? k : (k[i] ?? Number.NaN)), 1);
  const scaled = (value: number | null, i: number): number | null => (value === null || !Number.isFinite(at(i)) ? null : value * at(i));
  return {
    factor: factors.every((k) => typeof k === 'number') ? at(0) : null,
    points: official.points.map((p, i) => ({ at: p.at, value: scaled(p.value, i), expandedUncertainty: scaled(p.expandedUncertainty, i), official: p.value })),
  };
}
