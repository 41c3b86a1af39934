import { generateKeyPairSync, randomUUID } from 'node:crypto';
import { chmodSync, mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { database, openDatabase, type Database } from '@/db/client';
import { openAccount } from '@/db/writes/accounts/open-account';
import { publishKey } from '@/db/writes/records/enter-record';
import type { AccountRole } from '@/lib/policy/account-role';
import type { SignedInActor } from '@/lib/policy/actor';
import { decide } from '@/lib/services/decisions/decide';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { signWaiting, type SignerRoom } from '@/lib/signer/sign-decision';
import { loadSigningKey, type SigningKey } from '@/lib/signer/signing-key';
import { createS3Store } from '@/lib/storage/s3-store';
import { draftWithBursts, must, ORIGIN, type ServiceDesk } from './service-desk';

/** A person whose address belongs to a group of the demonstration. */
export async function personOf(name: string, group: string, role: AccountRole = 'member'): Promise<SignedInActor> {
  const email = `${name.toLowerCase().replace(/[^a-z]+/g, '-')}-${randomUUID().slice(0, 8)}@${group}.example`;
  const userId = await database().transaction((tx) => openAccount(tx, { name, email, role, affiliation: group, passwordHash: 'none' }));
  return { kind: 'member', userId, name, accountRole: role };
}

export const ANSWERS = {
  definition: 'Yes, by the settings declared.',
  conventions: 'They match the text.',
  data: 'Long enough and finely sampled.',
  budget: 'Credible; the resolution is missing.',
  scope: 'Justified for this noise curve.',
  candidates: '',
};
export const REPORT = { answers: ANSWERS, recommendation: 'enter-1', confidence: 4 } as const;

/** A submission with its official number, waiting in Triage. */
export async function inTriage(desk: ServiceDesk, author: SignedInActor): Promise<string> {
  const id = await draftWithBursts(author);
  must(await checkDraft(author, id));
  await desk.runAll();
  must(await lodgeSubmission(author, id));
  await desk.runAll();
  return id;
}

/** Asked and accepted. */
export async function withReferee(id: string, editor: SignedInActor, referee: SignedInActor): Promise<void> {
  const { invitationId } = must(await inviteReferee(editor, id, { refereeId: referee.userId, reason: 'Nobody else knows these curves.' }));
  must(await answerInvitation(referee, invitationId, { accept: true, noConflict: true }));
}

/** All reports in: Deciding. */
export async function inDeciding(desk: ServiceDesk, people: { author: SignedInActor; editor: SignedInActor; referee: SignedInActor }): Promise<string> {
  const id = await inTriage(desk, people.author);
  await withReferee(id, people.editor, people.referee);
  must(await handInReport(people.referee, id, REPORT));
  return id;
}

export const enterAtLevelOne = (editor: SignedInActor, id: string, typed: string) =>
  decide(editor, id, { kind: 'enter', level: 1, remarks: ['corrected during review'], prose: 'The number follows from the files. I enter it at level 1.', publicSentence: 'It stands as printed.', typed });

export interface SignerDesk extends SignerRoom {
  readonly database: Database;
  readonly keyFile: string;
  run(): ReturnType<typeof signWaiting>;
  close(): Promise<void>;
}

/** The signer under its own role, with a key of its own, and the clock at hand. */
export async function openSigner(desk: ServiceDesk): Promise<SignerDesk> {
  const { keyFile, key } = throwAwayKey();
  const db = openDatabase(desk.db.signerUrl, { max: 2, onError: () => undefined });
  await publishKey(db, { id: key.id, publicKey: key.publicPem });
  const room = { database: db, store: createS3Store(desk.store.env), key, keyFile, domain: ORIGIN, now: () => new Date() };
  return { ...room, run: () => signWaiting(room), close: () => db.$client.end() };
}

export function throwAwayKey(): { readonly keyFile: string; readonly key: SigningKey } {
  const keyFile = path.join(mkdtempSync(path.join(tmpdir(), 'counterfoil-key-')), 'signing-key.pem');
  writeFileSync(keyFile, generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }));
  chmodSync(keyFile, 0o600);
  return { keyFile, key: loadSigningKey(keyFile) };
}
