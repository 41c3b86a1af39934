import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { ResultPoint } from '@/lib/pipeline/result';
import type { VariationChanges } from '@/lib/services/variations/variation-view';

/** A number that follows from the official one by a factor alone, without any rerun. */
export interface AtOncePoint {
  readonly at: Readonly<Record<string, number>>;
  readonly value: number | null;
  readonly expandedUncertainty: number | null;
  readonly official: number | null;
}
export interface AtOnce {
  readonly factor: number;
  readonly points: readonly AtOncePoint[];
}

type Used = (name: string) => UsedSetting | undefined;
/** The factor on the number when a setting goes from one value to another; null where it is more than a factor. */
type Rule = (from: number, to: number, used: Used) => number | null;

const sine = (degrees: number): number => Math.sin((degrees * Math.PI) / 180);
/** In the source's frame the distance sets the redshift, and with it the mass that the detector sees. */
const inDetectorFrame = (used: Used): boolean => used('massFrame')?.value === 'detector';

const detectors: Rule = (from, to) => Math.sqrt(to / from);
const armAngleDeg: Rule = (from, to) => sine(to) / sine(from);

/** Exact by the definitions of settings and quantities, and held to reruns of the engine by a test. */
const RULES: Readonly<Record<string, Readonly<Record<string, Rule>>>> = {
  snr: { detectors, armAngleDeg, distanceMpc: (from, to, used) => (inDetectorFrame(used) ? from / to : null) },
  'distinguishability-snr': { parameters: (from, to) => Math.sqrt(to / from) },
  'em-energy': { fieldGauss: (from, to, used) => (used('fieldGauss')?.standing === 'declared' ? (to / from) ** 2 : null) },
};

interface Official {
  readonly quantity: string;
  readonly settings: readonly UsedSetting[];
  readonly points: readonly Pick<ResultPoint, 'at' | 'value' | 'expandedUncertainty'>[];
}

/** The varied number at once, where every change is a factor on it; else null, and only a rerun can tell. */
export function atOnce({ quantity, settings, points }: Official, changes: VariationChanges): AtOnce | null {
  const used: Used = (name) => settings.find((setting) => setting.name === name);
  const changed = Object.entries(changes.settings ?? {});
  if (changes.noise !== undefined || changed.length === 0) return null;
  let factor = 1;
  for (const [name, to] of changed) {
    const from = used(name);
    const rule = RULES[quantity]?.[name];
    if (!rule || typeof to !== 'number' || typeof from?.value !== 'number' || from.standing === 'swept') return null;
    const own = rule(from.value, to, used);
    if (own === null || !Number.isFinite(own) || own <= 0) return null;
    factor *= own;
  }
  const scaled = (value: number | null): number | null => (value === null ? null : value * factor);
  return { factor, points: points.map((p) => ({ at: p.at, value: scaled(p.value), expandedUncertainty: scaled(p.expandedUncertainty), official: p.value })) };
}
