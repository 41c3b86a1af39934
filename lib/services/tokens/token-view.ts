import type { TokenScope } from '@/lib/policy/token-scopes';

/** A token as its owner sees it afterwards: never the secret, which is shown once when it is made. */
export interface TokenView {
  readonly id: string;
  readonly name: string;
  /** `cf_Ab3d…` */
  readonly hint: string;
  readonly scopes: readonly TokenScope[];
  readonly state: 'live' | 'expired' | 'revoked';
  readonly createdAt: string;
  readonly expiresAt: string;
  /** To the minute; null when it was never used. */
  readonly lastUsedAt: string | null;
  readonly revokedAt: string | null;
}

export interface MadeToken {
  readonly id: string;
  /** The whole token, now and never again. */
  readonly token: string;
  readonly expiresAt: string;
}
