import { genericOAuth } from 'better-auth/plugins';
import { hasOrcidForm } from '@/lib/kernel/orcid-id';
import { placeholderAddress } from './placeholder-address';

export const ORCID = 'orcid';

export interface OrcidClient {
  readonly issuer: string;
  readonly clientId: string;
  readonly clientSecret: string;
}

interface OrcidEnv {
  readonly ORCID_ISSUER?: string | undefined;
  readonly ORCID_CLIENT_ID?: string | undefined;
  readonly ORCID_CLIENT_SECRET?: string | undefined;
}

/** Null where sign-in with ORCID is not configured: then there is no button and no door. */
export function orcidClientOf(env: OrcidEnv): OrcidClient | null {
  const { ORCID_ISSUER: issuer, ORCID_CLIENT_ID: clientId, ORCID_CLIENT_SECRET: clientSecret } = env;
  return issuer && clientId && clientSecret ? { issuer, clientId, clientSecret } : null;
}

export const isOrcidConfigured = (env: OrcidEnv): boolean => orcidClientOf(env) !== null;

interface OrcidProfile {
  readonly sub?: unknown;
  readonly name?: unknown;
  readonly given_name?: unknown;
  readonly family_name?: unknown;
}

const words = (...parts: readonly unknown[]): string => parts.filter((part) => typeof part === 'string' && part.trim() !== '').join(' ');

/** A name may be private at ORCID; it is asked for together with the address. */
const nameOf = (profile: OrcidProfile): string => (words(profile.name) || words(profile.given_name, profile.family_name) || 'Name not public').slice(0, 120);

/**
 * An account is found by (provider, subject) and by nothing else: the address it begins with is random,
 * so that it can meet no other account's.
 */
export const orcidPlugin = ({ issuer, clientId, clientSecret }: OrcidClient) =>
  genericOAuth({
    config: [
      {
        providerId: ORCID,
        name: 'ORCID',
        discoveryUrl: `${issuer}/.well-known/openid-configuration`,
        clientId,
        clientSecret,
        scopes: ['openid'],
        pkce: true,
        requireIdTokenVerification: true,
        accountSubject: ({ profile }) => {
          const { sub } = profile as OrcidProfile;
          return typeof sub === 'string' && hasOrcidForm(sub) ? sub : '';
        },
        mapProfileToUser: (profile) => ({ name: nameOf(profile as OrcidProfile), email: placeholderAddress(), emailVerified: false }),
      },
    ],
  });
