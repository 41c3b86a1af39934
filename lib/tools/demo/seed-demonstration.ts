import { database } from '@/db/client';
import { users } from '@/db/schema/accounts';
import type { Course } from './course';
import { openDemoRoom, type DemoRoom } from './demo-room';
import { draft } from './draft';
import { loudness } from './loudness';
import { openAccounts, type DemoActors } from './open-accounts';
import { preciseMatch } from './precise-match';
import { radiatedEnergy } from './radiated-energy';
import { spinVisible } from './spin-visible';

const COURSES: readonly Course[] = [preciseMatch, spinVisible, radiatedEnergy, loudness, draft];

/** Fills an empty database; false when somebody has an account already, and then nothing is touched. */
export async function seedDemonstration(dataFolder: string, say: (line: string) => void): Promise<boolean> {
  const room = openDemoRoom();
  try {
    if ((await database().select({ id: users.id }).from(users).limit(1)).length > 0) return false;
    const people = await openAccounts(dataFolder);
    say(`${Object.keys(people).length} invented people have accounts`);
    await takeAllCourses(room, people, say);
    await room.sign();
    say('the signer entered what was decided');
    return true;
  } finally {
    await room.close();
  }
}

/** Side by side, for the computing threads are two; whatever breaks, no course is left running. */
async function takeAllCourses(room: DemoRoom, people: DemoActors, say: (line: string) => void): Promise<void> {
  const taken = COURSES.map(async ({ title, stands, run }) => {
    await run(room, people);
    say(`“${title}”: ${stands}`);
  });
  const broken = (await Promise.allSettled(taken)).find((one) => one.status === 'rejected');
  if (broken) throw broken.reason;
}
