import { inForce, isSwept, numberInForce, redshiftOf, takes, type FlipContext } from './flip-context';
import { loudnessDraft } from './noise';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const inM = ({ waveforms }: FlipContext): boolean => waveforms.length > 0 && waveforms.every(({ unit, ownTotalMassMsun }) => unit === 'M' || ownTotalMassMsun !== null);

const isHorizon = ({ claim }: FlipContext): boolean => claim.quantity.id === 'horizon-distance' || claim.quantity.id === 'horizon-redshift';

/** The mass of the source stretched by its redshift, or not. The redshift is the declared one, else that of the distance. */
export const massFrame: FlipsOfConvention = (context) => {
  const now = inForce(context, 'massFrame');
  if (!takes(context, 'massFrame') || !inM(context) || (now !== 'source' && now !== 'detector')) return [];
  const telling = now === 'source' ? { supports: [/redshifted\s+mass|detector[\s-]frame/i], contradicts: [/source[\s-]frame/i] } : { supports: [/source[\s-]frame|redshift|\bz\s*=\s*\d/i], contradicts: [/redshifted\s+mass|detector[\s-]frame/i] };
  if (now === 'source') return makeFlips(context, [{ convention: 'C11', option: 'detector', setting: 'massFrame', clause: 'the mass is that of the detector’s frame, not stretched by the redshift', change: { kind: 'rerun', settings: { massFrame: 'detector' } }, telling }]);
  const z = redshiftOf(context);
  if (!isHorizon(context) && z === null) return [];
  const settings = { massFrame: 'source' as const, ...(isHorizon(context) || z === null ? {} : { redshift: z }) };
  return makeFlips(context, [{ convention: 'C11', option: 'source', setting: 'massFrame', clause: 'the mass is that of the source’s frame and has to be stretched by the redshift', change: { kind: 'rerun', settings }, telling }]);
};

interface OtherMass {
  readonly option: string;
  readonly by: number;
  readonly words: string;
}

function otherMasses({ waveforms }: FlipContext): OtherMass[] {
  const binary = waveforms[0]?.binary ?? {};
  const q = binary.massRatio ?? 1;
  const symmetric = q / (1 + q) ** 2;
  return [
    { option: 'adm', by: 1 / (binary.admEnergy ?? 0.99), words: 'the mass of the whole spacetime' },
    { option: 'remnant', by: 1 / (binary.remnantMass ?? 0.952), words: 'the mass of the remnant' },
    { option: 'chirp', by: symmetric ** -0.6, words: 'the chirp mass' },
    { option: 'component', by: (1 + q) / q, words: 'the mass of the heavier body' },
    { option: 'half', by: q / (1 + q), words: 'twice the mass that was used, of one body alone' },
  ];
}

export const massMeaning: FlipsOfConvention = (context) =>
  takes(context, 'totalMassMsun') && inM(context) && (isSwept(context, 'totalMassMsun') || numberInForce(context, 'totalMassMsun') !== null)
    ? makeFlips(context, otherMasses(context).map(({ option, by, words }) => ({
        convention: 'C12', option, clause: option === 'half' ? 'one body’s mass is used in the place of the total' : `the stated mass is ${words}`, change: { kind: 'rerun', settings: {}, scaled: { setting: 'totalMassMsun', by } },
        telling: option === 'chirp' ? { supports: [/chirp\s+mass/i] } : option === 'adm' ? { supports: [/\bADM\b/] } : {},
      })))
    : [];

/** A distance enters loudness as its inverse. */
export const distanceMeaning: FlipsOfConvention = (context) => {
  const z = isHorizon(context) ? null : redshiftOf(context);
  if (z === null || z <= 0 || context.claim.quantity.id !== 'snr') return [];
  const draft = (option: string, k: number, clause: string, words: RegExp): FlipDraft => ({ convention: 'C13', option, clause, change: { kind: 'factor', factor: k }, telling: { supports: [words], contradicts: [/luminosity\s+distance/i] } });
  return makeFlips(context, [
    draft('comoving', 1 / (1 + z), 'the stated distance is a comoving one', /comoving/i),
    draft('angular', 1 / (1 + z) ** 2, 'the stated distance is an angular-diameter one', /angular[\s-]diameter/i),
    draft('used-comoving', 1 + z, 'the comoving distance is used for the luminosity distance', /comoving/i),
  ]);
};

const cosmologies = [
  { option: 'h70', value: { h0: 70, omegaM: 0.3 } }, { option: 'h73', value: { h0: 73, omegaM: 0.27 } }, { option: 'h67', value: { h0: 67.4, omegaM: 0.315 } },
  { option: 'eds70', value: { h0: 70, omegaM: 1 } }, { option: 'eds50', value: { h0: 50, omegaM: 1 } },
];

export const expansion: FlipsOfConvention = (context) => {
  const now = inForce(context, 'cosmology') as { h0: number; omegaM: number } | undefined;
  if (!takes(context, 'cosmology') || now === undefined) return [];
  return makeFlips(context, cosmologies.filter(({ value }) => value.h0 !== now.h0 || value.omegaM !== now.omegaM).map(({ option, value }) => ({
    convention: 'C14', option, setting: 'cosmology', clause: `the universe expands with H₀ = ${value.h0} km/s/Mpc and Ω_m = ${value.omegaM}`, change: { kind: 'rerun', settings: { cosmology: value } },
    telling: { supports: [new RegExp(String.raw`H_?0?\s*=\s*${value.h0}\b`, 'i')] },
  })));
};

/** A threshold divides a reach in the detector’s frame; elsewhere it has to be found again. */
export const thresholds: FlipsOfConvention = (context) => {
  const now = numberInForce(context, 'threshold');
  if (now === null) return [];
  if (!isHorizon(context)) {
    const matches = [0.95, 0.965, 0.97, 0.98, 0.99].filter((x) => x !== now);
    return makeFlips(context, matches.map((x) => ({ convention: 'C17', option: `threshold=${x}`, setting: 'threshold', clause: `a signal counts as seen from a match of ${x} on instead of ${now}`, change: { kind: 'rerun', settings: { threshold: x } } })));
  }
  return makeFlips(context, [5, 7, 8, 10, 12].filter((x) => x !== now).map((x) => loudnessDraft(context, now / x, {
    convention: 'C17', option: `threshold=${x}`, setting: 'threshold', declares: { threshold: x }, clause: `a source counts as heard from an SNR of ${x} on instead of ${now}`,
    telling: { supports: [new RegExp(String.raw`(?:SNR|threshold|signal[\s-]to[\s-]noise)[^.\d]{0,30}${x}\b`, 'i')] },
  })));
};

/** A count of sources grows with the volume, or, taken wrongly, with the area. */
export const rateLaw: FlipsOfConvention = (context) => {
  const now = inForce(context, 'rateLaw');
  if (context.claim.quantity.id !== 'volume-ratio' || now === undefined) return [];
  const values = context.points.flatMap(({ value }) => (value !== null && value > 0 ? [value] : []));
  const area: FlipDraft | null = now === 'euclidean' && values.length === context.points.length ? { convention: 'C18', option: 'area', setting: 'rateLaw', clause: 'the ratio of loudness enters squared instead of cubed', change: { kind: 'factor', factor: values.map((v) => v ** (-1 / 3)) } } : null;
  const other = now === 'euclidean' ? 'comoving' : 'euclidean';
  const needsMass = other === 'comoving' && !inM(context);
  const law: FlipDraft | null = needsMass ? null : { convention: 'C18', option: other, setting: 'rateLaw', clause: other === 'comoving' ? 'the volume is the comoving one of an expanding universe' : 'the volume is that of flat space, ρ³', change: { kind: 'rerun', settings: { rateLaw: other } } };
  return makeFlips(context, [law, area]);
};

export const massFlips: readonly FlipsOfConvention[] = [massFrame, massMeaning, distanceMeaning, expansion, thresholds, rateLaw];
