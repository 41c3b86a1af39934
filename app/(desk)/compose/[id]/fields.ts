/**
 * The composer's form and the claim sheet are two writings of one thing: here is the way from one to
 * the other and back. What the form has no field for travels along untouched in `rest`, so that
 * opening and saving a sheet loses nothing.
 */
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { hasDatasets } from './array-mapping';
import { claimFromFields, fieldsFromClaim, type ClaimFields } from './claim-fields';

type Json = Readonly<Record<string, unknown>>;

export interface WaveformFields {
  name: string;
  /** One file; several files, one a mode, stay in `rest` and are listed. */
  file: string;
  /** Names of the columns with blanks between, as in the sheet. */
  columns: string;
  domain: string;
  variable: string;
  timeUnit: string;
  amplitudeUnit: string;
  polarisation: string;
  negativeM: string;
  mode: string;
  totalMassMsun: string;
  distanceMpc: string;
  psi4Factor: string;
  junkEndM: string;
  massRatio: string;
  chi1z: string;
  chi2z: string;
  admEnergy: string;
  admAngularMomentum: string;
  remnantMass: string;
  remnantSpin: string;
  eccentricity: string;
  fieldGauss: string;
  series: string;
  resolution: string;
  extractionRadiusM: string;
  radiusType: string;
  timeLabel: string;
  tetrad: string;
  rest: Json;
}

export interface NoiseFields {
  name: string;
  kind: 'file' | 'curve';
  file: string;
  meaning: string;
  columns: string;
  sided: string;
  curve: string;
  rest: Json;
}

export interface ComposerFields {
  title: string;
  statement: string;
  waveforms: WaveformFields[];
  noise: NoiseFields[];
  claims: ClaimFields[];
}

const texts = ['file', 'domain', 'variable', 'timeUnit', 'amplitudeUnit', 'polarisation', 'negativeM', 'series', 'radiusType', 'timeLabel', 'tetrad'] as const;
const numbers = ['totalMassMsun', 'distanceMpc', 'psi4Factor', 'junkEndM', 'resolution', 'extractionRadiusM'] as const;
const binaryNumbers = ['massRatio', 'chi1z', 'chi2z', 'admEnergy', 'admAngularMomentum', 'remnantMass', 'remnantSpin', 'eccentricity', 'fieldGauss'] as const;

const text = (value: unknown): string => (typeof value === 'string' ? value : typeof value === 'number' ? String(value) : '');
const without = (json: Json, names: readonly string[]): Json => Object.fromEntries(Object.entries(json).filter(([name]) => !names.includes(name)));
const given = (entries: readonly (readonly [string, unknown])[]): Json => Object.fromEntries(entries.filter(([, value]) => value !== undefined));

/** A number where the text is one; else the text itself, so that the check can say what it saw. */
export const numberFrom = (typed: string): unknown => {
  const trimmed = typed.trim();
  if (trimmed === '') return undefined;
  const value = Number(trimmed);
  return Number.isFinite(value) ? value : trimmed;
};
const wordFrom = (typed: string): unknown => (typed.trim() === '' ? undefined : typed.trim());
const listFrom = (typed: string): unknown => (typed.trim() === '' ? undefined : typed.trim().split(/[\s,;]+/));

function fieldsFromWaveform(name: string, json: Json): WaveformFields {
  const binary = (typeof json.binary === 'object' && json.binary !== null ? json.binary : {}) as Json;
  const one = (names: readonly string[], from: Json) => Object.fromEntries(names.map((n) => [n, text(from[n])]));
  return {
    ...(one(texts, json) as Pick<WaveformFields, (typeof texts)[number]>),
    ...(one(numbers, json) as Pick<WaveformFields, (typeof numbers)[number]>),
    ...(one(binaryNumbers, binary) as Pick<WaveformFields, (typeof binaryNumbers)[number]>),
    name,
    columns: Array.isArray(json.columns) ? json.columns.join(' ') : '',
    mode: Array.isArray(json.mode) ? json.mode.join(',') : '',
    rest: { ...without(json, [...texts, ...numbers, 'columns', 'mode', 'binary']), ...(Object.keys(without(binary, binaryNumbers)).length > 0 ? { binary: without(binary, binaryNumbers) } : {}) },
  };
}

function waveformFromFields(w: WaveformFields): Json {
  const binary = { ...(w.rest.binary as Json | undefined), ...given(binaryNumbers.map((n) => [n, numberFrom(w[n])])) };
  return {
    ...given([...texts.map((n) => [n, wordFrom(w[n])] as const), ['columns', listFrom(w.columns)], ['mode', w.mode.trim() === '' ? undefined : w.mode.split(',').map(numberFrom)], ...numbers.map((n) => [n, numberFrom(w[n])] as const)]),
    ...without(w.rest, ['binary']),
    ...(Object.keys(binary).length > 0 ? { binary } : {}),
  };
}

const MEANINGS = ['asd', 'psd', 'characteristic'];

function fieldsFromNoise(name: string, json: Json): NoiseFields {
  const columns = Array.isArray(json.columns) ? json.columns.map(String) : [];
  return {
    name,
    kind: typeof json.curve === 'string' ? 'curve' : 'file',
    file: text(json.file),
    meaning: columns.find((c) => MEANINGS.includes(c)) ?? '',
    columns: columns.join(' '),
    sided: text(json.sided),
    curve: text(json.curve),
    rest: without(json, ['file', 'columns', 'sided', 'curve']),
  };
}

function noiseFromFields(n: NoiseFields): Json {
  if (n.kind === 'curve') return { ...given([['curve', wordFrom(n.curve)]]), ...n.rest };
  return { ...given([['file', wordFrom(n.file)], ['columns', listFrom(n.columns)], ['sided', wordFrom(n.sided)]]), ...n.rest };
}

export function fieldsFromSheet(sheet: DraftSheet): ComposerFields {
  return {
    title: sheet.title,
    statement: sheet.statement,
    waveforms: Object.entries(sheet.waveforms).map(([name, json]) => fieldsFromWaveform(name, json)),
    noise: Object.entries(sheet.noise).map(([name, json]) => fieldsFromNoise(name, json)),
    claims: sheet.claims.map(fieldsFromClaim),
  };
}

type SheetParts = Pick<DraftSheet, 'waveforms' | 'noise' | 'claims'>;

/** A name that is empty or taken gets one of its own: a row must not be lost because its name is not settled yet. */
function named<T extends { readonly name: string }>(rows: readonly T[], make: (row: T) => Json): Record<string, Json> {
  const made: Record<string, Json> = {};
  for (const row of rows) {
    const wanted = row.name.trim() || 'unnamed';
    let name = wanted;
    for (let i = 2; Object.hasOwn(made, name); i++) name = `${wanted}-${i}`;
    made[name] = make(row);
  }
  return made;
}

export function sheetFromFields(fields: ComposerFields): SheetParts {
  return { waveforms: named(fields.waveforms, waveformFromFields), noise: named(fields.noise, noiseFromFields), claims: fields.claims.map(claimFromFields) };
}

/** What a text file most often holds. */
export const usualColumns = 't re22 im22';

export const emptyWaveform = (name: string, file = ''): WaveformFields => ({ ...fieldsFromWaveform(name, {}), file, columns: file && !hasDatasets(file) ? usualColumns : '' });
/** A declaration of a sheet under a name of this draft. */
export const noiseNamed = (name: string, declaration: Json): NoiseFields => fieldsFromNoise(name, declaration);

export const emptyNoise = (name: string, file = ''): NoiseFields => ({ ...fieldsFromNoise(name, {}), file, kind: file ? 'file' : 'curve', meaning: 'asd', columns: file ? 'f asd' : '', curve: file ? '' : 'G2' });
