import type { Quantity } from '../contract/quantity';
import { amplitudeDifference } from './amplitude-difference';
import { distinguishabilitySnr } from './distinguishability-snr';
import { horizonDistance } from './horizon-distance';
import { horizonRedshift } from './horizon-redshift';
import { match } from './match';
import { mismatch } from './mismatch';
import { overlap } from './overlap';
import { peakLuminosity } from './peak-luminosity';
import { phaseDifference } from './phase-difference';
import { radiatedAngularMomentum } from './radiated-angular-momentum';
import { radiatedEnergy } from './radiated-energy';
import { recoil } from './recoil';
import { ringdownDamping } from './ringdown-damping';
import { ringdownFrequency } from './ringdown-frequency';
import { snr } from './snr';
import { snrRatio } from './snr-ratio';
import { volumeRatio } from './volume-ratio';

/** The one table of what can be claimed; a quantity that is not in it is refused by name. */
export const quantities: ReadonlyMap<string, Quantity> = new Map(
  [overlap, match, mismatch, distinguishabilitySnr, snr, snrRatio, volumeRatio, horizonDistance, horizonRedshift, radiatedEnergy, radiatedAngularMomentum, peakLuminosity, recoil, ringdownFrequency, ringdownDamping, phaseDifference, amplitudeDifference].map((quantity) => [quantity.id, quantity]),
);
