import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import { LATER } from './courses';
import type { Course } from './course';

/** Which courses are still to be begun once the site is open; a file, so that a stop in between is no loss. */
const fileIn = (dataFolder: string): string => path.join(dataFolder, 'demo-later.json');

export const leaveForLater = (dataFolder: string): void => writeList(dataFolder, LATER.map(({ title }) => title));

/** The next course, taken off the list: one that breaks off half-way stands where it stands, and is not begun twice. */
export function takeNext(dataFolder: string): Course | undefined {
  const file = fileIn(dataFolder);
  if (!existsSync(file)) return undefined;
  const [title, ...others] = z.array(z.string()).parse(JSON.parse(readFileSync(file, 'utf8')));
  writeList(dataFolder, others);
  return LATER.find((course) => course.title === title);
}

function writeList(dataFolder: string, titles: readonly string[]): void {
  if (titles.length === 0) rmSync(fileIn(dataFolder), { force: true });
  else writeFileSync(fileIn(dataFolder), `${JSON.stringify(titles, null, 2)}\n`);
}
