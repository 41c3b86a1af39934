import { waveformNames, type Claim, type ClaimSheet } from '@/lib/claims/claim';
import { sheetFindings } from '@/lib/claims/sheet-findings';
import type { Finding } from '@/lib/engine/contract/finding';
import type { NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import type { ReadHdf5 } from '@/lib/formats/hdf5/hdf5-ask';
import { readNoise } from '@/lib/formats/read-noise';
import { readWaveform } from '@/lib/formats/read-waveform';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { HashedFiles } from './hashed-files';

/** A named input of the sheet with what was found in it; null when a finding stops its use. */
export interface Found<T> {
  readonly input: T | null;
  readonly findings: readonly Finding[];
  /** What is written on it: its names and the comments of its files. */
  readonly writing: readonly { readonly where: string; readonly text: string }[];
}

export interface Inputs {
  readonly waveforms: ReadonlyMap<string, Found<Waveform>>;
  readonly noise: ReadonlyMap<string, Found<NoiseCurve>>;
  readonly files: HashedFiles;
}

/** Half a gibibyte of samples in one sheet. */
const mostNumbers = 2 ** 26;

/** Every file of the sheet, one after another so that memory holds one table at a time while it grows. */
export async function readInputs(sheet: ClaimSheet, files: HashedFiles, onFile: (doing: string) => void, readHdf5: ReadHdf5 | null = null): Promise<Result<Inputs, Problem[]>> {
  const problems: Problem[] = [];
  const waveforms = new Map<string, Found<Waveform>>();
  const noise = new Map<string, Found<NoiseCurve>>();
  let numbers = 0;
  for (const declaration of sheet.waveforms.values()) {
    onFile(`reading ${declaration.name}`);
    const read = await readWaveform(declaration, files.open, readHdf5);
    if (read.ok) numbers += numbersIn(read.value.waveform);
    if (numbers > mostNumbers) return err([...problems, tooLarge]);
    if (read.ok) waveforms.set(declaration.name, { input: read.value.waveform, findings: [...sheetFindings(declaration), ...read.value.findings], writing: read.value.writing.map(({ file, text }) => ({ where: file, text })) });
    else problems.push(...read.error);
  }
  for (const declaration of sheet.noise.values()) {
    onFile(`reading ${declaration.name}`);
    const read = await readCurve(declaration, files, readHdf5);
    if (read.ok) noise.set(declaration.name, read.value);
    else problems.push(...read.error);
  }
  return problems.length > 0 ? err(once(problems)) : ok({ waveforms, noise, files });
}

const tooLarge: Problem = { code: 'formats/sheet-too-large', where: '/waveforms', saw: `more than ${mostNumbers} numbers in all waveforms together`, expected: `at most ${mostNumbers}`, hint: 'Thin the records, cut them before the parts that the claims use, or make several sheets.' };

function numbersIn(waveform: Waveform | null): number {
  if (waveform === null) return 0;
  const { axis, content } = waveform;
  return axis.length * (content.kind === 'modes' ? 1 + 2 * content.modes.length : 3);
}

async function readCurve(declaration: NoiseDeclaration, files: HashedFiles, readHdf5: ReadHdf5 | null): Promise<Result<Found<NoiseCurve>, Problem[]>> {
  if (declaration.kind === 'built-in') return ok({ input: builtInCurve(declaration.curve) ?? null, findings: [], writing: [] });
  const read = await readNoise(declaration, files.open, readHdf5);
  if (!read.ok) return read;
  if (read.value.noise === null) return ok({ input: null, findings: read.value.findings, writing: [] });
  const curve = tabulatedCurve(read.value.noise);
  const writing = read.value.noise.writing.map((text) => ({ where: declaration.file, text }));
  return ok(curve.ok ? { input: curve.value.curve, findings: [...curve.value.findings, ...read.value.findings], writing } : { input: null, findings: curve.error, writing });
}

/** Two names may share one file; its faults are told once. */
function once(problems: readonly Problem[]): Problem[] {
  return [...new Map(problems.map((problem) => [JSON.stringify(problem), problem])).values()];
}

/**
 * V28: the same bytes for two things that should differ: two waveforms of a claim under different
 * file names, or two modes of one waveform. One file named for both waveforms is meant that way.
 */
export function duplicateFindings(claim: Claim, sheet: ClaimSheet, files: HashedFiles): Finding[] {
  const names = waveformNames(claim.of);
  const all = names.flatMap((name) => (sheet.waveforms.get(name)?.files ?? []).map(({ file }) => ({ name, file, sha256: files.sha256(file) })));
  return all.flatMap((first, i) =>
    all.slice(i + 1).flatMap((second): Finding[] => {
      const same = first.sha256 !== null && first.sha256 === second.sha256 && (first.name === second.name || first.file !== second.file);
      if (!same) return [];
      const oneWaveform = first.name === second.name;
      return [{
        code: 'formats/duplicate-files', level: 'stops-lodging', where: oneWaveform ? first.name : `${first.name}, ${second.name}`,
        text: `The files ${first.file} and ${second.file} are identical byte for byte, though the sheet gives them as two ${oneWaveform ? 'modes' : 'waveforms'}.`,
        fix: oneWaveform ? 'Attach the file of each mode.' : 'Attach the file that was meant, or name one file in both places if the same data are meant.',
      }];
    }),
  );
}
