import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';

/** What decides whether a changed setting is a factor on the number. */
export interface FactorFacts {
  readonly quantity: string;
  /** Settings in force, as the result has them. */
  readonly used: (name: string) => UsedSetting | undefined;
  /** Facts beside the file of the waveform that the number is of. */
  readonly binary: BinaryFacts;
}

interface Step extends FactorFacts {
  readonly from: unknown;
  readonly to: unknown;
}

/** The factor on the number when a setting goes from one value to another; null where it is more than a factor. */
type Rule = (step: Step) => number | null;

const numbers = (law: (from: number, to: number, step: Step) => number | null): Rule => (step) => (typeof step.from === 'number' && typeof step.to === 'number' ? law(step.from, step.to, step) : null);

const sine = (degrees: number): number => Math.sin((degrees * Math.PI) / 180);
const valueOf = ({ used }: Step, name: string): unknown => used(name)?.value;
const declares = ({ used }: Step, name: string): boolean => used(name)?.standing === 'declared';
/** In the source's frame the distance sets the redshift, and with it the mass that the detector sees. */
const inDetectorFrame = (step: Step): boolean => valueOf(step, 'massFrame') === 'detector';

const asRoot = numbers((from, to) => Math.sqrt(to / from));
const inversely = numbers((from, to) => from / to);
const whereDetected = (rule: Rule): Rule => (step) => (inDetectorFrame(step) ? rule(step) : null);
/** Common to both sides, so that it cancels; no result names what it took there. */
const cancels: Rule = ({ to }) => (typeof to === 'number' ? 1 : null);

const network: Readonly<Record<string, Rule>> = { detectors: asRoot, armAngleDeg: numbers((from, to) => sine(to) / sine(from)) };
const bothSides: Readonly<Record<string, Rule>> = { detectors: cancels, armAngleDeg: cancels };

/** Over the sky with both polarisations: a fifth of the power, whatever the modes. With one of them only the engine knows the other. */
const overTheSky: Rule = (step) => (step.from === 'optimal' && step.to === 'sky' && valueOf(step, 'response') === 'complex' ? Math.sqrt(1 / 5) : null);

/** The mass that an energy, a speed or a frequency is referred to, in M; null where the sheet does not say. */
function massOf(word: unknown, { admEnergy, remnantMass }: BinaryFacts): number | null {
  if (word === 'M') return 1;
  const mass = word === 'adm' ? admEnergy : word === 'remnant' ? remnantMass : undefined;
  return mass !== undefined && mass > 0 ? mass : null;
}

const referred = (power: 1 | -1): Rule => ({ from, to, binary }) => {
  const [before, after] = [massOf(from, binary), massOf(to, binary)];
  return before === null || after === null ? null : (before / after) ** power;
};

/** An energy in waves of a test field goes with B̂² = (B·M)²; as the file has it, only the engine knows the field. */
const withTheField = numbers((from, to, step) => (declares(step, 'fieldGauss') && declares(step, 'totalMassMsun') ? (to / from) ** 2 : null));
const ofTestField: Readonly<Record<string, Rule>> = { fieldGauss: withTheField, totalMassMsun: withTheField };

const euclidean = (rule: Rule): Rule => (step) => (valueOf(step, 'rateLaw') === 'euclidean' ? rule(step) : null);

/** Exact by the definitions of settings and quantities, and held to reruns of the engine by a test. */
const RULES: Readonly<Record<string, Readonly<Record<string, Rule>>>> = {
  snr: { ...network, distanceMpc: whereDetected(inversely), average: overTheSky },
  'hybrid-snr': { ...network, distanceMpc: whereDetected(inversely) },
  'horizon-distance': { detectors: whereDetected(asRoot), armAngleDeg: whereDetected(network['armAngleDeg']!), threshold: whereDetected(inversely), average: whereDetected(overTheSky) },
  'snr-ratio': bothSides,
  'volume-ratio': { detectors: euclidean(cancels), armAngleDeg: euclidean(cancels) },
  overlap: bothSides,
  match: bothSides,
  mismatch: bothSides,
  'distinguishability-snr': { ...bothSides, parameters: asRoot },
  'radiated-energy': { normaliseBy: referred(1) },
  recoil: { normaliseBy: referred(1) },
  'ringdown-frequency': { normaliseBy: referred(-1) },
  'ringdown-damping': { normaliseBy: referred(-1) },
  'em-energy': ofTestField,
  'em-ratio': ofTestField,
  'em-frequency': { totalMassMsun: inversely, plasmaDensityCm3: cancels },
  'disc-luminosity': { totalMassMsun: inversely, radiativeEfficiency: cancels, accretionRateMsunPerYear: cancels, internalEnergyErg: cancels, radiusM: cancels },
};

/** Null where only a rerun can tell: no rule, a swept setting, one taken away. */
export function settingFactor(facts: FactorFacts, name: string, to: unknown): number | null {
  const now = facts.used(name);
  if (now?.standing === 'swept') return null;
  const factor = RULES[facts.quantity]?.[name]?.({ ...facts, from: now?.value, to }) ?? null;
  return factor !== null && Number.isFinite(factor) && factor > 0 ? factor : null;
}
