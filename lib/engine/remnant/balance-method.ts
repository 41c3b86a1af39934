import type { DeclaredSettings } from '../contract/settings';
import type { BinaryFacts } from '../contract/waveform';

export type RemnantMethod = NonNullable<DeclaredSettings['method']>;

/** How the remnant is found: as declared, else from the stated initial energy, else from a post-Newtonian start. */
export const methodOf = ({ method }: DeclaredSettings, { admEnergy }: BinaryFacts): RemnantMethod => method ?? (admEnergy === undefined ? 'balance-pn' : 'balance-adm');
