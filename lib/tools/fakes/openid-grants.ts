import { createHash, randomBytes } from 'node:crypto';
import type { OpenIdPerson } from '@/lib/tools/fakes/openid-people';

/** What one sign-in asked for, as far as its end has to be held against it. */
export interface OpenIdRequest {
  readonly redirectUri: string;
  readonly challenge: string;
  readonly nonce: string | null;
}

const CODE_LIVES_MS = 60_000;
const TOKEN_LIVES_MS = 600_000;

/** Codes and access tokens that are out; in memory, so a restart forgets them all. */
export class OpenIdGrants {
  readonly #codes = new Map<string, { person: OpenIdPerson; request: OpenIdRequest; until: number }>();
  readonly #tokens = new Map<string, { person: OpenIdPerson; until: number }>();

  issueCode(person: OpenIdPerson, request: OpenIdRequest): string {
    const code = randomBytes(24).toString('base64url');
    this.#codes.set(code, { person, request, until: Date.now() + CODE_LIVES_MS });
    return code;
  }

  /** A code is spent by the first try, right or wrong. */
  redeem(code: string, redirectUri: string, verifier: string): { person: OpenIdPerson; nonce: string | null; accessToken: string } | undefined {
    const held = this.#codes.get(code);
    this.#codes.delete(code);
    if (!held || held.until < Date.now() || held.request.redirectUri !== redirectUri) return undefined;
    if (createHash('sha256').update(verifier).digest('base64url') !== held.request.challenge) return undefined;
    const accessToken = randomBytes(24).toString('base64url');
    this.#tokens.set(accessToken, { person: held.person, until: Date.now() + TOKEN_LIVES_MS });
    return { person: held.person, nonce: held.request.nonce, accessToken };
  }

  personOf(accessToken: string): OpenIdPerson | undefined {
    const held = this.#tokens.get(accessToken);
    return held && held.until >= Date.now() ? held.person : undefined;
  }
}
