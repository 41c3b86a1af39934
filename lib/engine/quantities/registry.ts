import type { Quantity } from '../contract/quantity';
import { radiatedEnergy } from './radiated-energy';

/** The one table of what can be claimed; a quantity that is not in it is refused by name. */
export const quantities: ReadonlyMap<string, Quantity> = new Map([radiatedEnergy].map((quantity) => [quantity.id, quantity]));
