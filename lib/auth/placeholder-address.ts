import { randomUUID } from 'node:crypto';

/**
 * ORCID gives no address, and the sign-in library wants one for every account. Until its owner has
 * confirmed a real one, an account carries a random one under a name that can never be delivered to.
 */
const DOMAIN = '@no-address.invalid';

export const placeholderAddress = (): string => `${randomUUID()}${DOMAIN}`;
export const isPlaceholderAddress = (email: string): boolean => email.endsWith(DOMAIN);
