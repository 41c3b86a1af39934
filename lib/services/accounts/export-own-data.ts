import { database, type Reader } from '@/db/client';
import { findAccount, listDeclinedLetters } from '@/db/reads/accounts/account';
import { listFilesOf, listInvitationsToOneself, listOwnComments, listOwnDecisions, listOwnNotes, listOwnReports, listOwnSubmissionsWhole, listOwnTokens, listRevisionsOf } from '@/db/reads/accounts/own-data';
import { hasPassword, listLiveSessions, listOrcidLinks } from '@/db/reads/accounts/ways-in';
import { isPlaceholderAddress } from '@/lib/auth/placeholder-address';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { OPTIONAL_LETTERS } from '@/lib/reviews/optional-letters';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';

/**
 * All that one account holds and its owner wrote, as one document, and nobody else's name in it. A file is
 * told by name, length and digest; its bytes are fetched from its submission. Hashes and secrets stay here.
 */
export async function exportOwnData(actor: Actor): Promise<Outcome<Readonly<Record<string, unknown>>>> {
  const grant = mayGenerally('account.read-own', actor);
  if (!grant.ok) return grant;
  const db = database();
  const userId = userIdOf(actor) ?? '';
  const account = await findAccount(db, userId);
  if (!account) return { ok: false, error: NOT_FOUND };
  const { email, emailVerified, ...rest } = account;
  const declined = await listDeclinedLetters(db, userId);
  return ok({
    format: 'counterfoil-own-data/1',
    madeAt: new Date().toISOString(),
    account: { ...rest, email: isPlaceholderAddress(email) ? null : email, emailVerified },
    waysIn: { password: await hasPassword(db, userId), orcid: await listOrcidLinks(db, userId) },
    sessions: (await listLiveSessions(db, userId)).map(({ id: _id, ...session }) => session),
    tokens: await listOwnTokens(db, userId),
    letters: Object.fromEntries(OPTIONAL_LETTERS.map((letter) => [letter, !declined.includes(letter)])),
    submissions: await submissionsWhole(db, userId),
    invitations: await listInvitationsToOneself(db, userId),
    reports: await listOwnReports(db, userId),
    notesToEditors: await listOwnNotes(db, userId),
    comments: await listOwnComments(db, userId),
    decisions: await listOwnDecisions(db, userId),
  });
}

async function submissionsWhole(reader: Reader, userId: string) {
  const own = await listOwnSubmissionsWhole(reader, userId);
  const revisions = await listRevisionsOf(reader, own.map(({ id }) => id));
  const files = await listFilesOf(reader, revisions.map(({ id }) => id));
  const filesOf = (revision: string) => files.filter((file) => file.revisionId === revision).map(({ revisionId: _revisionId, ...file }) => file);
  const revisionsOf = (submission: string) => revisions.filter((row) => row.submissionId === submission).map(({ id, submissionId: _submissionId, ...row }) => ({ ...row, files: filesOf(id) }));
  return own.map((submission) => ({ ...submission, revisions: revisionsOf(submission.id) }));
}
