import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { atPoints, inForce, isSwept, numberInForce, takes, type FlipContext, type SiblingClaim } from './flip-context';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const factor = (convention: FlipDraft['convention'], option: string, k: number | readonly number[], clause: string, rest: Partial<FlipDraft> = {}): FlipDraft => ({ convention, option, clause, change: { kind: 'factor', factor: k }, ...rest });

/** Which body is the first: spins and masses exchanged. */
export const bodyLabels: FlipsOfConvention = (context) => {
  const binary: BinaryFacts = context.waveforms[0]?.binary ?? {};
  const chi1z = numberInForce(context, 'chi1z') ?? binary.chi1z ?? 0;
  const chi2z = numberInForce(context, 'chi2z') ?? binary.chi2z ?? 0;
  if (!takes(context, 'chi1z') || chi1z === chi2z) return [];
  return makeFlips(context, [{ convention: 'C41', option: 'swap', clause: 'the first body is the lighter one: the spins change places', change: { kind: 'rerun', settings: { chi1z: chi2z, chi2z: chi1z } }, exchange: true }]);
};

/** The sign of a spin, and spins by the total mass instead of the body's. */
export const spinMeaning: FlipsOfConvention = (context) => {
  const binary: BinaryFacts = context.waveforms[0]?.binary ?? {};
  const [chi1z, chi2z] = [numberInForce(context, 'chi1z') ?? binary.chi1z ?? 0, numberInForce(context, 'chi2z') ?? binary.chi2z ?? 0];
  if (!takes(context, 'chi1z') || (chi1z === 0 && chi2z === 0)) return [];
  const q = numberInForce(context, 'massRatio') ?? binary.massRatio ?? 1;
  const perTotal = [chi1z * ((1 + q) / q) ** 2, chi2z * (1 + q) ** 2] as const;
  return makeFlips(context, [
    { convention: 'C42', option: 'sign', clause: 'spins count as positive against the orbital angular momentum', change: { kind: 'rerun', settings: { chi1z: -chi1z, chi2z: -chi2z } }, exchange: true },
    perTotal.some((chi) => Math.abs(chi) > 1) ? null : { convention: 'C42', option: 'per-total', clause: 'the stated spins are S/M², by the total mass', change: { kind: 'rerun', settings: { chi1z: perTotal[0], chi2z: perTotal[1] } }, exchange: true },
  ]);
};

const inFrequency = new Set(['ringdown-frequency', 'cycles', 'em-frequency']);

export const orbitalOrWave: FlipsOfConvention = (context) =>
  inFrequency.has(context.claim.quantity.id)
    ? makeFlips(context, [
        factor('C43', 'orbital', 0.5, 'it is counted by the orbit, at half the frequency of the wave', { telling: { supports: [/orbital/i] } }),
        factor('C43', 'wave', 2, 'a number counted by the orbit is doubled to the wave’s', { telling: { supports: [/orbital/i] } }),
        factor('C43', 'angular', 2 * Math.PI, 'it is an angular frequency, ω = 2πf'),
        factor('C43', 'ordinary', 1 / (2 * Math.PI), 'it is a frequency f, not ω = 2πf'),
      ])
    : [];

const ofLuminosity = new Set(['em-energy', 'em-ratio']);

export const electromagneticUnits: FlipsOfConvention = (context) =>
  ofLuminosity.has(context.claim.quantity.id)
    ? makeFlips(context, [
        factor('C47', 'times-4pi', 4 * Math.PI, 'the field is in Heaviside–Lorentz units: the luminosity carries no 1/4π', { telling: { supports: [/heaviside/i] } }),
        factor('C47', 'over-4pi', 1 / (4 * Math.PI), 'the factor 1/4π of Gaussian units is applied twice'),
        factor('C47', 'tesla', 1e8, 'the field is in tesla'),
        factor('C48', 'doubled', 2, 'the flux of φ₂ carries 1/2π instead of 1/4π'),
        factor('C48', 'halved', 0.5, 'the flux of φ₂ is halved'),
      ])
    : [];

/** The reference by each value; null where one is missing. */
function ratios(values: readonly (number | null)[], reference: number | null): number[] | null {
  const known = values.flatMap((value) => (value !== null && value > 0 && reference !== null ? [reference / value] : []));
  return known.length === values.length ? known : null;
}

/** With B instead of B², or with B² and no M²; the reference is the first point of a sweep, another claim of the sheet, or what the file was computed at. */
export const fieldLaw: FlipsOfConvention = (context) => {
  if (!ofLuminosity.has(context.claim.quantity.id)) return [];
  const file = ownField(context);
  const fields = atPoints(context, 'fieldGauss');
  const reference = (isSwept(context, 'fieldGauss') ? fields[0] : (siblingField(context, fields[0] ?? null) ?? file?.gauss)) ?? null;
  const linear = reference !== null && fields.some((b) => b !== reference) ? ratios(fields, reference) : null;
  const masses = atPoints(context, 'totalMassMsun');
  const first = isSwept(context, 'totalMassMsun') ? (masses[0] ?? null) : (file?.massMsun ?? null);
  const unscaled = first !== null && masses.some((mass) => mass !== first) ? (ratios(masses, first)?.map((ratio) => ratio ** 2) ?? null) : null;
  return makeFlips(context, [
    linear === null ? null : factor('C50', `linear-from-${reference}`, linear, `the number is carried on from ${reference} G with B instead of B²`),
    unscaled === null ? null : factor('C50', 'no-mass', unscaled, 'the number is carried on from the first mass without M²'),
  ]);
};

/** Field and mass at which a file of φ₂ was computed; null where it is per unit of field, or does not say. */
function ownField({ waveforms }: FlipContext): { readonly gauss: number; readonly massMsun: number } | null {
  const file = waveforms.find(({ variable }) => variable === 'phi2');
  const [gauss, massMsun] = [file?.binary.fieldGauss, file?.ownTotalMassMsun ?? undefined];
  return file?.amplitudeUnit !== 'perField' && gauss !== undefined && massMsun !== undefined ? { gauss, massMsun } : null;
}

/** The claim of the same quantity that stands next in the sheet and has another field. */
function siblingField({ siblings }: FlipContext, own: number | null): number | null {
  const others = siblings.filter((one: SiblingClaim) => one.fieldGauss !== null && one.fieldGauss !== own);
  return others[0]?.fieldGauss ?? null;
}

export const fieldMass: FlipsOfConvention = (context) =>
  ofLuminosity.has(context.claim.quantity.id) && (isSwept(context, 'totalMassMsun') || numberInForce(context, 'totalMassMsun') !== null)
    ? makeFlips(context, [['half', 0.5, 'half the total mass'], ['twice', 2, 'twice the total mass']].map(([option, by, words]) => ({ convention: 'C49', option: String(option), clause: `the field is converted with ${words}`, change: { kind: 'rerun', settings: {}, scaled: { setting: 'totalMassMsun', by: Number(by) } } })))
    : [];

export const hybridAmplitude: FlipsOfConvention = (context) => {
  const now = inForce(context, 'amplitudeOrder');
  if (!takes(context, 'amplitudeOrder') || now === undefined) return [];
  return makeFlips(context, [0, 1].filter((order) => order !== now).map((order) => ({ convention: 'C53', option: `amplitudeOrder=${order}`, setting: 'amplitudeOrder', clause: order === 0 ? 'the amplitude below the join is the restricted one' : 'the amplitude below the join carries its first correction', change: { kind: 'rerun', settings: { amplitudeOrder: order } }, telling: { supports: [order === 0 ? /restricted/i : /corrected/i] } })));
};

const fractions = new Set(['match', 'overlap', 'mismatch', 'fitting-factor', 'detectable-fraction', 'radiated-energy', 'em-energy', 'em-ratio', 'mode-content', 'degeneracy']);

export const perCent: FlipsOfConvention = (context) =>
  fractions.has(context.claim.quantity.id) ? makeFlips(context, [factor('C55', 'per-cent', 100, 'it is given in per cent'), factor('C55', 'from-per-cent', 0.01, 'a fraction is divided by a hundred once more')]) : [];

export const unitFlips: readonly FlipsOfConvention[] = [bodyLabels, spinMeaning, orbitalOrWave, electromagneticUnits, fieldLaw, fieldMass, hybridAmplitude, perCent];
