import { database } from '@/db/client';
import { users } from '@/db/schema/accounts';
import type { Course } from './course';
import { EARLY, LATER } from './courses';
import { openDemoRoom, openWaitingRoom, type DemoRoom } from './demo-room';
import { recheckRecords } from '../recheck-records';
import { leaveForLater, takeNext } from './later-courses';
import { findAccounts, openAccounts, type DemoActors } from './open-accounts';

type Say = (line: string) => void;

/** Fills an empty database; false when somebody has an account already, and then nothing is touched. */
export async function seedDemonstration(dataFolder: string, say: Say, everything = false): Promise<boolean> {
  const room = openDemoRoom();
  try {
    if ((await database().select({ id: users.id }).from(users).limit(1)).length > 0) return false;
    const people = await openAccounts(dataFolder);
    say(`${Object.keys(people).length} invented people have accounts`);
    await takeAllCourses(everything ? [...EARLY, ...LATER] : EARLY, room, people, say);
    await room.sign();
    say('the signer entered what was decided');
    await recheckRecords(room, people.szenthe, say);
    if (!everything) leaveForLater(dataFolder);
    return true;
  } finally {
    await room.close();
  }
}

/** An author may have three runs under way, and most authors have several courses. */
const LANES = 3;

/** Side by side in lanes, for the computing threads are two; whatever breaks, no course is left running. */
async function takeAllCourses(courses: readonly Course[], room: DemoRoom, people: DemoActors, say: Say): Promise<void> {
  const waiting = [...courses];
  const lane = async (): Promise<void> => {
    for (let course = waiting.shift(); course; course = waiting.shift()) {
      await course.run(room, people);
      say(`“${course.title}”: ${course.stands}`);
    }
  };
  const broken = (await Promise.allSettled(Array.from({ length: LANES }, lane))).find((one) => one.status === 'rejected');
  if (broken) throw broken.reason;
}

/** The rest, one after another beside the open site: whatever a visitor asks goes first. */
export async function seedTheRest(dataFolder: string, say: Say): Promise<void> {
  const room = openWaitingRoom();
  try {
    const people = await findAccounts();
    for (let course = takeNext(dataFolder); course; course = takeNext(dataFolder)) {
      await course.run(room, people);
      say(`“${course.title}”: ${course.stands}`);
    }
  } finally {
    await room.close();
  }
}
