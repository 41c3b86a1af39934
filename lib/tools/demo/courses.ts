import type { Course } from './course';
import { draft } from './draft';
import { electromagneticTwin } from './electromagnetic-twin';
import { horizon } from './horizon';
import { longSignal } from './long-signal';
import { loudness } from './loudness';
import { keptLoudness, movedEnergy } from './old-records';
import { oppositeSpins } from './opposite-spins';
import { preciseMatch } from './precise-match';
import { radiatedEnergy } from './radiated-energy';
import { recoil } from './recoil';
import { remnant } from './remnant';
import { sourceFrame } from './source-frame';
import { spinBlindSearch } from './spin-blind-search';
import { spinVisible } from './spin-visible';
import { typedByHand } from './typed-by-hand';
import { unconvergedPhase } from './unconverged-phase';
import { weakSpins } from './weak-spins';

const all: readonly Course[] = [
  ...[preciseMatch, spinVisible, radiatedEnergy, loudness, draft, keptLoudness, movedEnergy],
  ...[weakSpins, sourceFrame, recoil, electromagneticTwin, horizon, typedByHand],
  ...[unconvergedPhase, oppositeSpins, longSignal, remnant, spinBlindSearch],
];

/** Those that the site opens with, and those that its own worker measures while it is open. */
export const EARLY = all.filter(({ beforeOpening }) => beforeOpening);
export const LATER = all.filter(({ beforeOpening }) => !beforeOpening);
