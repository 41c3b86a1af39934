import type { ListRole, Role, SingleRole } from '@/lib/engine/contract/quantity';

export const singleRoles: readonly SingleRole[] = ['a', 'b', 'em', 'gw'];
export const listRoles: readonly ListRole[] = ['series', 'signals', 'templates'];
export const everyRole: readonly Role[] = [...singleRoles, ...listRoles];

/** Does the role take several waveforms? */
export const isList = (role: Role): role is ListRole => (listRoles as readonly Role[]).includes(role);
