/**
 * Views: what a service gives, arranged as the record component wants it. No reading and no deciding
 * happens here, so that the same arrangement serves draft, review and public pages.
 */
import type { ClaimHeading, ClaimedPoint } from '@/app/_ui/claim/record-view';
import { headingOf } from '@/app/_ui/claim/claim-heading';
import { parseClaimed } from '@/lib/claims/claimed';
import { unitOf } from '@/lib/engine/contract/quantity';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import type { ResultClaim } from '@/lib/pipeline/result';
import { readingsOf, unsaidOf } from './setting-readings';

type Loose = Readonly<Record<string, unknown>>;

const isLoose = (value: unknown): value is Loose => typeof value === 'object' && value !== null && !Array.isArray(value);
const text = (value: unknown): string | null => (typeof value === 'string' && value !== '' ? value : null);

const printedOf = (raw: unknown): string => {
  const claimed = parseClaimed(raw);
  return claimed.ok ? claimed.value.printed : text(raw) ?? 'not readable yet';
};

/** Points of a claim as its sheet has them: one, or one for each value of the swept setting. */
function pointsOf(claim: Loose, isLn: boolean): readonly ClaimedPoint[] {
  const declared = typeof claim['tolerance'] === 'number' ? claim['tolerance'] : null;
  const tolerance = declared !== null && isLn ? Math.log1p(declared) : declared;
  const over = isLoose(claim['over']) ? Object.entries(claim['over'])[0] : undefined;
  const claimed = Array.isArray(claim['claimed']) ? claim['claimed'] : [claim['claimed']];
  const values = over && Array.isArray(over[1]) ? over[1] : [];
  return claimed.map((raw, i) => ({ at: over && typeof values[i] === 'number' ? { [over[0]]: values[i] } : {}, printed: printedOf(raw), tolerance }));
}

/** The parts of a sheet from which headings take their words. */
interface SheetParts {
  readonly waveforms: Readonly<Record<string, Loose>>;
  readonly noise: Readonly<Record<string, Loose>>;
  readonly claims: readonly Loose[];
}

const filesIn = (part: Loose | undefined): readonly string[] => {
  const many = isLoose(part?.['files']) ? Object.values(part['files']) : [];
  return [part?.['file'], ...many].filter((name): name is string => typeof name === 'string');
};

/** The waveforms that name a series as theirs. */
const membersOf = (series: unknown, sheet: SheetParts): string[] => Object.entries(sheet.waveforms).flatMap(([name, waveform]) => (waveform['series'] === series ? [name] : []));

/** Names of waveforms and curve, and the files they stand in. */
function wordsOf(claim: Loose | undefined, sheet: SheetParts) {
  const of = isLoose(claim?.['of']) ? claim['of'] : undefined;
  const noise = text(claim?.['noise']);
  const names = Object.entries(of ?? {}).flatMap(([role, value]) => (role === 'series' ? membersOf(value, sheet) : [value].flat())).filter((name): name is string => typeof name === 'string');
  const files = [...names.flatMap((name) => filesIn(sheet.waveforms[name])), ...(noise ? filesIn(sheet.noise[noise]) : [])];
  return { of, noise, ...(files.length > 0 ? { files: [...new Set(files)] } : {}), ...sourcesOf(claim, names, noise, sheet) };
}

/** What a printed number says of its data; a claim that the sheet does not hold gives nothing but whether it needs a curve. */
function sourcesOf(claim: Loose | undefined, names: readonly string[], noise: string | null, sheet: SheetParts): Pick<ClaimHeading, 'waveforms' | 'noiseSource'> {
  if (!claim) return {};
  const needsNoise = quantities.get(text(claim['quantity']) ?? '')?.needsNoise ?? noise !== null;
  return {
    waveforms: names.map((name) => ({ name, files: filesIn(sheet.waveforms[name]) })),
    noiseSource: needsNoise ? noiseSourceOf(noise, sheet) : null,
  };
}

/** How our knowledge of a citation came about stands on the methods page, not in what is printed. */
const inPrint = (source: string): string => source.replace(/ \([^()]*from memory\)/, '');

function noiseSourceOf(noise: string | null, sheet: SheetParts): ClaimHeading['noiseSource'] {
  const declared = noise === null ? undefined : sheet.noise[noise];
  const curve = builtInCurves.find(({ id }) => id === declared?.['curve']);
  if (curve) return { kind: 'built-in', id: curve.id, title: curve.title, source: inPrint(curve.source), fHighHz: curve.fHighHz };
  const file = text(declared?.['file']);
  return noise !== null && file !== null ? { kind: 'file', name: noise, file } : undefined;
}

/** Headings before any run: all from the sheet, complete or not. */
export function headingsOfSheet(sheet: SheetParts): readonly ClaimHeading[] {
  return sheet.claims.map((claim, i) => {
    const id = text(claim['id']) ?? `C${i + 1}`;
    const name = text(claim['quantity']) ?? 'quantity not chosen';
    const quantity = quantities.get(name) ?? null;
    const empty: ResultClaim = { id, quantity: name, unit: quantity ? unitOf(quantity, isLoose(claim['settings']) ? claim['settings'] : {}) : '', verdict: 'not-computable', remarks: [], coverage: { state: 'unknown' }, points: [], budget: [], assumed: [], settings: [], routeB: [], findings: [], candidates: [] };
    return { ...headingOf(empty, quantity, wordsOf(claim, sheet)), points: pointsOf(claim, quantity?.scale === 'ln') };
  });
}

export const noSheet: SheetParts = { waveforms: {}, noise: {}, claims: [] };

/** Headings of what was computed; the sheet adds the names of waveforms and curve. */
export function headingsOfResult(claims: readonly Omit<ResultClaim, 'candidates'>[], sheet: SheetParts): readonly ClaimHeading[] {
  return claims.map((claim) => {
    const quantity = quantities.get(claim.quantity) ?? null;
    const words = wordsOf(sheet.claims.find((c) => c['id'] === claim.id), sheet);
    const heading = headingOf(claim, quantity, quantity?.needsNoise === false ? { ...words, noiseSource: null } : words);
    return { ...heading, readings: readingsOf(claim.quantity, claim.settings.map(({ name }) => name)), unsaid: unsaidOf(claim.quantity) };
  });
}
