import type { BinaryFacts, Variable, Waveform } from './waveform';
import type { ArrayLayout } from './array-layout';
import type { ModeIndex } from './settings';

/**
 * What a sheet says about a file, after its words were checked: the claim room writes it, the
 * formats room reads bytes by it. House defaults are already filled in.
 */
export type ColumnRole =
  | { readonly kind: 'axis' }
  | { readonly kind: 'skip' }
  | { readonly kind: 're' | 'im' | 'amplitude' | 'phase'; readonly mode: ModeIndex | null }
  | { readonly kind: 'plus' | 'cross' | 'luminosity' }
  | { readonly kind: 'noise'; readonly meaning: 'asd' | 'psd' | 'characteristic' };

export interface Column {
  /** As the sheet spells it, for messages and for a header line of the file. */
  readonly name: string;
  readonly role: ColumnRole;
}

export interface SourceFile {
  readonly file: string;
  /** The mode this file holds, for one file a mode; null when the columns or the declaration say it. */
  readonly mode: ModeIndex | null;
}

export interface WaveformDeclaration {
  readonly name: string;
  readonly files: readonly SourceFile[];
  readonly columns: readonly Column[];
  /** For files of arrays; null for text. `columns` then says what stands in an N×K array. */
  readonly arrays: ArrayLayout | null;
  readonly domain: 'time' | 'frequency';
  readonly variable: Variable;
  readonly timeUnit: 'M' | 's' | '1/M' | 'Hz';
  readonly amplitudeUnit: Waveform['amplitudeUnit'];
  readonly polarisation: 'plus-minus-i-cross' | 'plus-plus-i-cross';
  readonly negativeM: 'mirror' | 'given' | 'none' | null;
  readonly psi4Factor: number;
  /** For columns that do not name their mode; [2, 2] when the sheet says nothing. */
  readonly mode: ModeIndex;
  /** True when neither columns, files nor `mode` name one: frequency series in Hz are then a line of sight. */
  readonly modeAssumed: boolean;
  readonly totalMassMsun: number | null;
  readonly distanceMpc: number | null;
  readonly junkEndM: number | null;
  readonly binary: BinaryFacts;
  /** Which run of a simulation this is, as far as the sheet says. */
  readonly run: RunFacts;
}

/** What tells one run of a simulation from another, and the frame it was read off in. */
export type RunFacts = Pick<Waveform, 'series' | 'resolution' | 'extractionRadiusM' | 'radiusType' | 'timeLabel' | 'tetrad'>;

export type NoiseDeclaration =
  | { readonly kind: 'table'; readonly name: string; readonly file: string; /** For files of arrays; null for text. */ readonly arrays: ArrayLayout | null; readonly columns: readonly Column[]; readonly sided: 'one' | 'two' }
  | { readonly kind: 'built-in'; readonly name: string; readonly curve: string };
