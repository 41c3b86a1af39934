import type { NoiseDeclaration, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { Catalogue } from './catalogue';
import { checkPart } from './check-part';
import type { Claim, ClaimSheet } from './claim';
import { caseClashes } from './file-path';
import { parseClaim } from './parse-claim';
import { parseNoise } from './noise';
import { describe, pointer } from './pointer';
import { isName, nameRule, sheetSchema } from './sheet-schema';
import { parseSheetText } from './sheet-text';
import { parseWaveform } from './waveform';

const known = Object.keys(sheetSchema.shape);

/** From the bytes of `claim.json`, or its parsed JSON, to claims; or every problem of the sheet at once. */
export function parseClaimSheet(sheetJson: Uint8Array | unknown, catalogue: Catalogue): Result<ClaimSheet, Problem[]> {
  if (!(sheetJson instanceof Uint8Array)) return parseSheetValue(sheetJson, catalogue);
  const value = parseSheetText(sheetJson);
  return value.ok ? parseSheetValue(value.value, catalogue) : value;
}

function parseSheetValue(value: unknown, catalogue: Catalogue): Result<ClaimSheet, Problem[]> {
  const problems: Problem[] = [];
  const sheet = checkPart(sheetSchema, value, [], known, problems);
  const raw = partsOf(value);
  const waveforms = parseNamed('waveforms', raw.waveforms, (name, entry) => parseWaveform(name, entry, problems), problems);
  const noise = parseNamed('noise', raw.noise, (name, entry) => parseNoise(name, entry, catalogue.curves, problems), problems);
  problems.push(...caseClashes(pathsOf(waveforms, noise)));
  const claims = raw.claims.map((entry, i) => parseClaim(entry, i, { waveforms, noise, catalogue }, problems));
  problems.push(...repeatedIds(raw.claims));
  const whole = claims.filter((claim): claim is Claim => claim !== null);
  if (problems.length > 0 || !sheet) return err(problems);
  return ok({ title: sheet.title ?? '', statement: sheet.statement ?? '', waveforms: present(waveforms), noise: present(noise), claims: whole });
}

/** Taken from the value itself: the parts are judged even when the sheet's own words are off, and no name is lost on the way. */
function partsOf(value: unknown): { waveforms?: Record<string, unknown>; noise?: Record<string, unknown>; claims: unknown[] } {
  const object = (part: unknown): Record<string, unknown> => (typeof part === 'object' && part !== null && !Array.isArray(part) ? (part as Record<string, unknown>) : {});
  const { waveforms, noise, claims } = object(value);
  return { waveforms: object(waveforms), noise: object(noise), claims: Array.isArray(claims) ? claims.slice(0, 1000) : [] };
}

function parseNamed<T>(part: 'waveforms' | 'noise', raw: Record<string, unknown> | undefined, parse: (name: string, entry: unknown) => T | null, problems: Problem[]): Map<string, T | null> {
  const parsed = new Map<string, T | null>();
  for (const [name, entry] of Object.entries(raw ?? {})) {
    if (!isName(name)) problems.push({ code: 'claims/not-allowed', where: pointer(part, name), saw: `the name ${describe(name)}`, expected: nameRule });
    parsed.set(name, parse(name, entry));
  }
  return parsed;
}

function present<T>(entries: ReadonlyMap<string, T | null>): Map<string, T> {
  return new Map([...entries].filter((entry): entry is [string, T & {}] => entry[1] !== null));
}

function pathsOf(waveforms: ReadonlyMap<string, WaveformDeclaration | null>, noise: ReadonlyMap<string, NoiseDeclaration | null>): { path: string; where: string }[] {
  const fromWaveforms = [...waveforms].flatMap(([name, w]) => (w?.files ?? []).map(({ file }) => ({ path: file, where: pointer('waveforms', name) })));
  const fromNoise = [...noise].flatMap(([name, n]) => (n?.kind === 'table' ? [{ path: n.file, where: pointer('noise', name, 'file') }] : []));
  return [...fromWaveforms, ...fromNoise];
}

function repeatedIds(claims: readonly unknown[]): Problem[] {
  const first = new Map<string, number>();
  return claims.flatMap((claim, i) => {
    const id = typeof claim === 'object' && claim !== null && 'id' in claim ? claim.id : undefined;
    if (typeof id !== 'string') return [];
    const seen = first.get(id);
    if (seen === undefined) first.set(id, i);
    return seen === undefined ? [] : [{ code: 'claims/id-twice', where: pointer('claims', i, 'id'), saw: `${describe(id)}, as in claim ${seen}`, expected: 'an id of its own for each claim' }];
  });
}
