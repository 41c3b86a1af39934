import type { CompletedModes } from '../conditioning/complete-modes';
import { selectModes } from '../conditioning/select-modes';
import type { ModeIndex } from '../contract/settings';
import type { PreparedPoint } from './prepare-radiated';

/** Modes that the claim lists and the completed file does not hold. */
export const listedButMissing = ({ waveform }: CompletedModes, { settings }: PreparedPoint): readonly ModeIndex[] =>
  selectModes(waveform, { modes: settings.modes, lMax: null, withZeroM: true }).missing;

/** Does the claim say itself which modes it means? */
export const restrictsModes = ({ settings }: PreparedPoint): boolean => settings.modes !== 'all' || settings.lMax !== null;
