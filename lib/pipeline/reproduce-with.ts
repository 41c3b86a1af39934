import type { Catalogue } from '@/lib/claims/catalogue';
import type { Claim, ClaimSheet } from '@/lib/claims/claim';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { parseSheetText } from '@/lib/claims/sheet-text';
import type { Figure, Measurement } from '@/lib/engine/contract/measurement';
import { Cancelled } from '@/lib/engine/contract/quantity';
import { ENGINE_VERSION } from '@/lib/engine/version';
import type { ReadHdf5 } from '@/lib/formats/hdf5/hdf5-ask';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { OpenFile } from '@/lib/formats/open-file';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { HashedFiles, type StreamingDigest } from './hashed-files';
import { explainSheet, type Explained, type SearchEnd } from './explain/explain-sheet';
import { measureOtherwise } from './explain/measure-otherwise';
import { offeredReadings, type ReadingsByClaim } from './explain/offered-readings';
import type { Weighed } from './explain/subject';
import { keptGuesses, sheetGuesses } from './guesses/sheet-guesses';
import { measureClaim, resolveInputs } from './measure-claim';
import { missingFiles, placed } from './missing-files';
import { readInputs, type Inputs } from './read-inputs';
import type { FiguresByClaim, ResultClaim, ResultDocument } from './result';
import { weighClaim } from './weigh-claim';

/**
 * The pipeline walks one sheet from the hall to the weighing room. It is pure: files, digests,
 * progress and the wish to stop are handed in, and the same input gives the same bytes.
 */
export interface Source {
  /** Bytes of `claim.json`, or its JSON already parsed. */
  readonly sheetJson: Uint8Array | unknown;
  readonly openFile: OpenFile;
  /** Reads HDF5 in a thread of its own; without it such files are refused. */
  readonly readHdf5?: ReadHdf5;
}

export interface ReproduceOptions {
  readonly withFigures: boolean;
  readonly onProgress: (fraction: number, doing: string) => void;
  readonly cancelled: () => boolean;
  /** Look for readings under which claims that do not agree would. */
  readonly explain?: SearchEnd;
  /** Each claim of the sheet read otherwise: of variations alone. */
  readonly otherwise?: ReadOtherwise;
  /** A fresh SHA-256. */
  readonly digest: () => StreamingDigest;
}

export interface Reproduced {
  readonly result: ResultDocument;
  readonly figures: FiguresByClaim;
  /** How each claim could be read otherwise: for people, beside figures. */
  readonly readings: ReadingsByClaim;
}

/** Share of the progress bar that reading files takes. */
const readingShare = 0.1;
/** And that measuring takes where a search comes after it. */
const measuringShare = 0.6;

export async function reproduceWith(catalogue: Catalogue, source: Source, options: ReproduceOptions): Promise<Result<Reproduced, Problem[]>> {
  const sheet = parseClaimSheet(source.sheetJson, catalogue);
  if (!sheet.ok) return err([...sheet.error, ...(await missingFiles(source.sheetJson, source.openFile))]);
  try {
    const files = new HashedFiles(source.openFile, options.digest);
    const inputs = await readInputs(sheet.value, files, fileProgress(sheet.value, options), source.readHdf5);
    if (!inputs.ok) return err(await placed(inputs.error, source.sheetJson, source.openFile));
    const measured = measureAll(sheet.value, inputs.value, options);
    // A variation asks what a number would be, not what the files say.
    return measured.ok && options.otherwise === undefined ? ok(withGuesses(measured.value, source, sheet.value, inputs.value)) : measured;
  } catch (thrown) {
    if (thrown instanceof Cancelled) return err([{ code: 'pipeline/cancelled', where: '', saw: 'a request to stop', expected: 'the run to be let finish' }]);
    throw thrown;
  }
}

/** What is declared and what is assumed stands in the sheet as it was written, not in what was made of it. */
function withGuesses(made: Reproduced, { sheetJson }: Source, sheet: ClaimSheet, inputs: Inputs): Reproduced {
  const written = sheetJson instanceof Uint8Array ? parseSheetText(sheetJson) : ok(sheetJson);
  return { ...made, result: { ...made.result, guesses: written.ok ? keptGuesses(sheetGuesses(written.value, sheet, inputs)) : [] } };
}

function fileProgress(sheet: ClaimSheet, options: ReproduceOptions): (doing: string) => void {
  const count = sheet.waveforms.size + sheet.noise.size;
  let done = 0;
  return (doing) => {
    if (options.cancelled()) throw new Cancelled();
    options.onProgress((readingShare * done++) / Math.max(1, count), doing);
  };
}

type Measured = Omit<Weighed, 'inputs'>;

function measureAll(sheet: ClaimSheet, inputs: Inputs, options: ReproduceOptions): Result<Reproduced, Problem[]> {
  const measured: Measured[] = [];
  for (const [i, claim] of sheet.claims.entries()) {
    const one = measureOne(claim, { sheet, inputs, share: i / sheet.claims.length }, options);
    if (!one.ok) return one;
    measured.push({ claim, measurement: one.value, result: weighClaim(claim, one.value) });
  }
  const weighed = measured.flatMap((one): Weighed[] => {
    const resolved = resolveInputs(one.claim, sheet, inputs);
    return resolved === null ? [] : [{ ...one, inputs: resolved }];
  });
  const explained = options.explain === undefined ? new Map<string, Explained>() : explainAll(sheet, inputs, weighed, { ...options, ...options.explain });
  const claims = measured.map(({ result }): ResultClaim => ({ ...result, ...explained.get(result.id) }));
  options.onProgress(1, 'done');
  return ok({
    result: { format: 'counterfoil-result/1', engine: ENGINE_VERSION, title: sheet.title, files: inputs.files.files(), claims },
    figures: options.withFigures ? Object.fromEntries(measured.map(({ claim, measurement }): [string, readonly Figure[]] => [claim.id, measurement.figures])) : {},
    readings: options.withFigures && options.otherwise === undefined ? offeredReadings(sheet, inputs, weighed) : {},
  });
}

interface Turn {
  readonly sheet: ClaimSheet;
  readonly inputs: Inputs;
  /** How much of the claims came before. */
  readonly share: number;
}

function measureOne(claim: Claim, { sheet, inputs, share }: Turn, options: ReproduceOptions): Result<Measurement, Problem[]> {
  if (options.cancelled()) throw new Cancelled();
  const forClaims = options.explain === undefined ? 1 - readingShare : measuringShare;
  const onProgress = (fraction: number, doing: string) =>
    options.onProgress(readingShare + forClaims * (share + Math.min(1, Math.max(0, fraction)) / sheet.claims.length), `${claim.id}: ${doing}`);
  onProgress(0, claim.quantity.title);
  const [extent, watch] = [{ withFigures: options.withFigures }, { onProgress, cancelled: options.cancelled }];
  return options.otherwise === undefined ? ok(measureClaim(claim, sheet, inputs, extent, watch)) : measureOtherwise(claim, sheet, inputs, options.otherwise, extent, watch);
}

function explainAll(sheet: ClaimSheet, inputs: Inputs, weighed: readonly Weighed[], { endedBy, onProgress, cancelled }: ReproduceOptions & SearchEnd): ReadonlyMap<string, Explained> {
  const from = readingShare + measuringShare;
  return explainSheet(sheet, inputs, weighed, { endedBy, cancelled, onProgress: (fraction, doing) => onProgress(from + (1 - from) * fraction, doing) });
}
