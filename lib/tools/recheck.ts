/**
 * Command line, as an administrator and beside a running worker: measures again what an earlier engine measured.
 * `node --import tsx lib/tools/recheck.ts ADDRESS`, with the environment of the web and the address of an administrator's account.
 */
import { eq } from 'drizzle-orm';
import { database } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { openWaitingRoom } from './demo/demo-room';
import { recheckRecords } from './recheck-records';

const room = openWaitingRoom();
try {
  const [account] = await database().select({ userId: users.id, name: users.name, role: users.role }).from(users).where(eq(users.email, process.argv[2] ?? ''));
  if (account?.role !== 'administrator') throw new Error('Name the address of an administrator’s account.');
  await recheckRecords(room, { kind: 'member', userId: account.userId, name: account.name, accountRole: 'administrator' }, console.log);
} catch (error) {
  console.error(error instanceof Error ? `Nothing more was measured again. ${error.message}` : error);
  process.exitCode = 1;
} finally {
  await room.close();
}
