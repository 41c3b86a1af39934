import { randomInt } from 'node:crypto';
import { existsSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { database } from '@/db/client';
import { users } from '@/db/schema/accounts';
import type { SignedInActor } from '@/lib/policy/actor';
import { createAccount } from '@/lib/services/accounts/create-account';
import { DEMO_PEOPLE, type DemoName, type DemoPerson } from './people';

export type DemoActors = Readonly<Record<DemoName, SignedInActor>>;

interface WrittenAccount {
  readonly role: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** No letter or digit that looks like another: these are read from one screen and typed on another. */
const LETTERS = 'abcdefghjkmnpqrstvwxyz23456789';
const GROUPS = 4;
const LETTERS_A_GROUP = 4;

const drawGroup = (): string => Array.from({ length: LETTERS_A_GROUP }, () => LETTERS[randomInt(LETTERS.length)]).join('');
const drawPassword = (): string => Array.from({ length: GROUPS }, drawGroup).join('-');

/** Opens everybody's account and writes down how to sign in, readable by this machine's user alone. */
export async function openAccounts(dataFolder: string): Promise<DemoActors> {
  const file = path.join(dataFolder, 'demo-accounts.json');
  const known = readAccounts(file);
  const written = Object.values<DemoPerson>(DEMO_PEOPLE).map(({ part, name, email }) => ({ role: part, name, email, password: known.get(email) ?? drawPassword() }));
  const passwords = new Map(written.map((w) => [w.email, w.password]));
  const open = async ([key, person]: readonly [string, DemoPerson]) => [key, await openAccount(person, passwords.get(person.email) ?? '')] as const;
  const actors = await Promise.all(Object.entries(DEMO_PEOPLE).map(open));
  writePrivately(file, written);
  return Object.fromEntries(actors) as DemoActors;
}

async function openAccount({ part: _part, ...person }: DemoPerson, password: string): Promise<SignedInActor> {
  const { name, role } = person;
  const userId = await createAccount({ ...person, password });
  return { kind: 'member', userId, name, accountRole: role };
}

/** The same people, once they have accounts. */
export async function findAccounts(): Promise<DemoActors> {
  const rows = await database().select({ userId: users.id, email: users.email }).from(users);
  const idOf = new Map(rows.map(({ email, userId }) => [email, userId]));
  const actors = Object.entries<DemoPerson>(DEMO_PEOPLE).map(([key, { email, name, role }]) => {
    const userId = idOf.get(email);
    if (userId === undefined) throw new Error(`${name} has no account`);
    return [key, { kind: 'member', userId, name, accountRole: role } satisfies SignedInActor] as const;
  });
  return Object.fromEntries(actors) as DemoActors;
}

/** A seed that begins again keeps the passwords that were printed already. */
function readAccounts(file: string): ReadonlyMap<string, string> {
  if (!existsSync(file)) return new Map();
  const accounts = JSON.parse(readFileSync(file, 'utf8')) as readonly WrittenAccount[];
  return new Map(accounts.map(({ email, password }) => [email, password]));
}

function writePrivately(file: string, accounts: readonly WrittenAccount[]): void {
  rmSync(`${file}.part`, { force: true });
  writeFileSync(`${file}.part`, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600, flag: 'wx' });
  renameSync(`${file}.part`, file);
}
