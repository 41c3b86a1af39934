import type { Quantity } from '../contract/quantity';
import { amplitudeDifference } from './amplitude-difference';
import { convergenceOrder } from './convergence-order';
import { cycles } from './cycles';
import { degeneracy } from './degeneracy';
import { discLuminosity } from './disc-luminosity';
import { detectableFraction } from './detectable-fraction';
import { distinguishabilitySnr } from './distinguishability-snr';
import { eccentricity } from './eccentricity';
import { extrapolatedValue } from './extrapolated-value';
import { emEnergy } from './em-energy';
import { emFrequency } from './em-frequency';
import { emMirroring } from './em-mirroring';
import { emRatio } from './em-ratio';
import { fieldExponent } from './field-exponent';
import { fittingFactor } from './fitting-factor';
import { horizonDistance } from './horizon-distance';
import { horizonRedshift } from './horizon-redshift';
import { hybridSnr } from './hybrid-snr';
import { match } from './match';
import { mismatch } from './mismatch';
import { modeContent } from './mode-content';
import { overlap } from './overlap';
import { peakLuminosity } from './peak-luminosity';
import { phaseDifference } from './phase-difference';
import { radiatedAngularMomentum } from './radiated-angular-momentum';
import { radiatedEnergy } from './radiated-energy';
import { radiusExtrapolation } from './radius-extrapolation';
import { recoil } from './recoil';
import { remnantFit } from './remnant-fit';
import { remnantMass } from './remnant-mass';
import { remnantSpin } from './remnant-spin';
import { ringdownDamping } from './ringdown-damping';
import { ringdownFrequency } from './ringdown-frequency';
import { snr } from './snr';
import { snrRatio } from './snr-ratio';
import { volumeRatio } from './volume-ratio';

/** The one table of what can be claimed; a quantity that is not in it is refused by name. */
export const quantities: ReadonlyMap<string, Quantity> = new Map(
  [overlap, match, mismatch, distinguishabilitySnr, fittingFactor, detectableFraction, degeneracy, snr, snrRatio, volumeRatio, horizonDistance, horizonRedshift, modeContent, hybridSnr, radiatedEnergy, radiatedAngularMomentum, peakLuminosity, recoil, remnantMass, remnantSpin, remnantFit, ringdownFrequency, ringdownDamping, cycles, eccentricity, phaseDifference, amplitudeDifference, convergenceOrder, extrapolatedValue, radiusExtrapolation, emEnergy, emRatio, fieldExponent, emFrequency, emMirroring, discLuminosity].map((quantity) => [quantity.id, quantity]),
);
