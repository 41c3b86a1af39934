import { database } from '@/db/client';
import { databaseAnswers } from '@/db/reads/database-answers';
import { webEnv } from '@/lib/env';
import { bucketAnswers } from '@/lib/storage/s3-store';

export interface Readiness {
  readonly ready: boolean;
  readonly database: boolean;
  readonly objectStore: boolean;
}

/** One check at a time, and none more often than once a second: the address is open to everybody. */
const HOLD_MS = 1000;
let last: { at: number; answer: Promise<Readiness> } | undefined;

export function checkReadiness(): Promise<Readiness> {
  if (!last || Date.now() - last.at > HOLD_MS) last = { at: Date.now(), answer: ask() };
  return last.answer;
}

async function ask(): Promise<Readiness> {
  const [answers, objectStore] = await Promise.all([databaseAnswers(database()), bucketAnswers(webEnv())]);
  return { ready: answers && objectStore, database: answers, objectStore };
}
