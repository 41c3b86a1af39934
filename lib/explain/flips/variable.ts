import type { Waveform } from '@/lib/engine/contract/waveform';
import type { FlipContext } from './flip-context';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const gravitational = ({ waveforms }: FlipContext): boolean => waveforms.length > 0 && waveforms.every(({ variable }) => variable === 'strain' || variable === 'news' || variable === 'psi4');

const words = { strain: 'the strain', news: 'the news, dh/dt', psi4: 'ψ₄' } as const;

/** Every series of the claim taken for another variable of the radiation. */
export const radiationVariable: FlipsOfConvention = (context) => {
  const now = context.waveforms[0]?.variable;
  if (!gravitational(context) || context.waveforms.some(({ unit, amplitudeUnit }) => unit !== 'M' || amplitudeUnit !== 'rh/M')) return [];
  return makeFlips(context, (['strain', 'news', 'psi4'] as const).filter((variable) => variable !== now).map((variable) => ({
    convention: 'C19', option: variable, clause: `the series is taken for ${words[variable]}`, change: { kind: 'rerun', settings: {}, inputs: [{ edit: 'variable', variable }] },
    telling: { supports: [variable === 'strain' ? /\bstrain\b/i : variable === 'news' ? /\bnews\b/i : /psi_?4|ψ_?4/i] },
  })));
};

const fluxes = new Set(['radiated-energy', 'radiated-angular-momentum', 'recoil', 'peak-luminosity']);

/** ψ₄ twice or half as large: fluxes go with its square. */
export const tetrad: FlipsOfConvention = (context) => {
  if (!fluxes.has(context.claim.quantity.id) || !gravitational(context)) return [];
  const isPsi4 = context.waveforms[0]?.variable === 'psi4';
  const draft = (option: string, factor: number, clause: string): FlipDraft => ({ convention: 'C20', option, clause, change: { kind: 'factor', factor }, ...(isPsi4 ? { telling: { supports: [/tetrad|psi_?4|ψ_?4/i] } } : {}) });
  return makeFlips(context, [draft('doubled', 4, 'ψ₄ is twice the second derivative of the strain'), draft('halved', 0.25, 'ψ₄ is half the second derivative of the strain')]);
};

const hasModes = ({ content }: Waveform): boolean => content.kind === 'modes';

/** Which role's file may turn the other way: of a recoil only the direction hangs on it, and that is not claimed; of one record alone, the sign of J_z. */
const turning = ({ claim: { of, quantity } }: FlipContext): string[] => (of.a === undefined ? [] : of.b !== undefined ? ['a', 'b'] : quantity.id === 'radiated-angular-momentum' ? ['a'] : []);

export const rotation: FlipsOfConvention = (context) =>
  context.waveforms.every(hasModes)
    ? makeFlips(context, turning(context).map((role) => ({ convention: 'C22', option: `conjugate-${role}`, clause: `${role} rotates the other way: its file gives h₊ + ih×`, change: { kind: 'rerun', settings: {}, inputs: [{ edit: 'conjugate', roles: [role] }] }, exchange: true, telling: { supports: [/h_?\+\s*\+\s*i/i, /plus\s*\+\s*i\s*\*?\s*cross/i] } })))
    : [];

const couples = new Set(['recoil', 'radiated-angular-momentum', 'mode-content', 'degeneracy', 'snr', 'match', 'mismatch', 'overlap']);

const severalModes = ({ waveforms }: FlipContext): boolean => waveforms.some(({ content }) => content.kind === 'modes' && content.modes.length > 1);
const mirrored = ({ waveforms }: FlipContext): boolean => waveforms.some(({ content, negativeM }) => content.kind === 'modes' && negativeM !== 'none' && (negativeM === 'mirror' || content.modes.some(({ m }) => m < 0) || negativeM === null));
const oddL = ({ waveforms }: FlipContext): boolean => waveforms.some(({ content }) => content.kind === 'modes' && content.modes.some(({ l }) => l % 2 === 1));

export const modeLabel: FlipsOfConvention = (context) =>
  couples.has(context.claim.quantity.id) && severalModes(context) && gravitational(context)
    ? makeFlips(context, [{ convention: 'C23', option: 'relabel', clause: 'm is read as −m, without the minus sign that odd ℓ then takes', change: { kind: 'rerun', settings: {}, inputs: [{ edit: 'relabel-m' }] }, exchange: true }])
    : [];

/** With the mirror's modes the two signs of m push alike in the orbital plane; the divisor must not hang on the energy. */
function halvesInPlane({ claim, waveforms, used }: FlipContext): boolean {
  const [waveform] = waveforms;
  if (claim.quantity.id !== 'recoil' || waveform?.content.kind !== 'modes') return false;
  const isMirror = waveform.negativeM !== 'none' && waveform.negativeM !== 'given' && waveform.content.modes.every(({ m }) => m >= 0);
  return isMirror && (used.get('normaliseBy')?.value !== 'remnant' || waveform.binary.remnantMass !== undefined);
}

export const negativeModes: FlipsOfConvention = (context) => {
  if (!gravitational(context) || !mirrored(context)) return [];
  const assumed = context.waveforms.every(({ negativeM }) => negativeM === null);
  const drafts: (FlipDraft | null)[] = [
    oddL(context) ? { convention: 'C24', option: 'no-sign', clause: 'modes of negative m are the plain conjugate of their partner, without the minus sign of odd ℓ', change: { kind: 'rerun', settings: {}, inputs: [{ edit: 'mirror-sign' }] }, assumed } : null,
    { convention: 'C24', option: 'absent', clause: 'modes of negative m are left out', change: { kind: 'rerun', settings: {}, inputs: [{ edit: 'drop-negative-m' }] }, assumed },
    halvesInPlane(context) ? { convention: 'C24', option: 'absent-in-plane', clause: 'modes of negative m are left out, and only the part of the recoil in the orbital plane is counted', change: { kind: 'factor', factor: 0.5 }, assumed } : null,
  ];
  return makeFlips(context, drafts);
};

/** An isotropic radius taken for an areal one: r = r_iso (1 + M/2r_iso)². Amplitudes are larger by the factor, fluxes by its square. */
export const radiusType: FlipsOfConvention = (context) => {
  const [waveform] = context.waveforms;
  const r = waveform?.extractionRadiusM;
  const { id } = context.claim.quantity;
  const power = fluxes.has(id) ? 2 : id === 'snr' ? 1 : 0;
  if (r === undefined || power === 0) return [];
  const k = (1 + 1 / (2 * r)) ** (2 * power);
  const type = waveform?.radiusType;
  return makeFlips(context, [
    type === 'isotropic' ? null : { convention: 'C27', option: 'isotropic', clause: 'the radius of extraction is isotropic, and the areal one multiplies the wave', change: { kind: 'factor', factor: k }, assumed: type === undefined, telling: { supports: [/isotropic/i] } },
    type === 'isotropic' ? { convention: 'C27', option: 'areal', clause: 'the radius of extraction is areal already', change: { kind: 'factor', factor: 1 / k }, telling: { supports: [/areal/i] } } : null,
  ]);
};

export const variableFlips: readonly FlipsOfConvention[] = [radiationVariable, tetrad, rotation, modeLabel, negativeModes, radiusType];
