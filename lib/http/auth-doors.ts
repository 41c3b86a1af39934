import { z } from 'zod';
import { isPlaceholderAddress } from '@/lib/auth/placeholder-address';
import { ORCID } from '@/lib/auth/orcid';

const email = z.email().max(254).refine((text) => !isPlaceholderAddress(text.toLowerCase()), 'an address that letters can reach');
const password = z.string().min(1).max(256);
const code = z.string().regex(/^\d{6}$/, 'six digits');
const recoveryCode = z.string().trim().regex(/^[A-Za-z0-9]{5}-?[A-Za-z0-9]{5}$/, 'ten letters and digits, as the code was shown').transform((text) => (text.includes('-') ? text : `${text.slice(0, 5)}-${text.slice(5)}`));
const nothing = z.strictObject({}).optional();
const withPassword = z.strictObject({ password: password.optional() });
/** Only a path of this site may follow, or a link could send people elsewhere. */
const next = z.string().max(2000).regex(/^\/(?![/\\])[^\\\u0000-\u001f]*$/, 'a path of this site');

const toOrcid = z.strictObject({ next }).transform(({ next: path }) => ({
  provider: ORCID,
  callbackURL: path,
  newUserCallbackURL: `/account/address?next=${encodeURIComponent(path)}`,
  errorCallbackURL: `/sign-in?next=${encodeURIComponent(path)}`,
  disableRedirect: true,
}));
/** The password is no field of the library's: it is looked at before it, and dropped there. */
const linkOrcid = withPassword.transform(({ password: given }) => ({ password: given, provider: ORCID, callbackURL: '/account?linked=orcid', errorCallbackURL: '/account', disableRedirect: true }));

/** The doors of the sign-in library that are open, each with the strict shape of its body. All else is not there. */
export const POST_DOORS: Readonly<Record<string, z.ZodType>> = {
  '/sign-in/email': z.strictObject({ email, password, rememberMe: z.boolean().optional() }),
  '/sign-in/social': toOrcid,
  '/link-social': linkOrcid,
  '/sign-up/email': z.strictObject({ email, password, name: z.string().trim().min(1).max(120) }),
  '/sign-out': nothing,
  '/request-password-reset': z.strictObject({ email }),
  '/reset-password': z.strictObject({ token: z.string().max(200), newPassword: password }),
  '/send-verification-email': z.strictObject({ email }),
  '/change-password': z.strictObject({ currentPassword: password, newPassword: password, revokeOtherSessions: z.literal(true) }),
  '/revoke-other-sessions': nothing,
  '/two-factor/enable': withPassword,
  '/two-factor/disable': withPassword,
  '/two-factor/generate-backup-codes': withPassword,
  '/two-factor/verify-totp': z.strictObject({ code }),
  '/two-factor/verify-backup-code': z.strictObject({ code: recoveryCode }),
};

export const CALLBACK = `/callback/${ORCID}`;
export const GET_DOORS: readonly string[] = ['/get-session', '/verify-email', CALLBACK];
/** These wait for ORCID's discovery document; no other door does. */
export const PROVIDER_DOORS: readonly string[] = ['/sign-in/social', '/link-social', CALLBACK];
/** Doors at which a signed-in account proves itself by its password, or, when it has none, by a young session. */
export const PROVEN_DOORS: readonly string[] = ['/change-password', '/link-social', '/two-factor/enable', '/two-factor/disable', '/two-factor/generate-backup-codes'];
