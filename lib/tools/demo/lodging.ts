import { createReadStream, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { SignedInActor } from '@/lib/policy/actor';
import { addCoAuthor } from '@/lib/services/submissions/change-people';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { createFromFolder } from '@/lib/services/submissions/load-sheet';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { must, type DemoRoom } from './demo-room';

const SPECIMENS = path.join(path.dirname(fileURLToPath(import.meta.url)), '..', '..', '..', 'content', 'specimens');

export const specimenSheet = (folder: string): string => readFileSync(path.join(SPECIMENS, folder, 'claim.json'), 'utf8');

/** A draft from a specimen's folder, as *Load a claim-sheet folder* makes it; another sheet may take the files. */
export async function loadSpecimen(author: SignedInActor, folder: string, sheet = specimenSheet(folder), wanted: (name: string) => boolean = () => true): Promise<string> {
  const names = readdirSync(path.join(SPECIMENS, folder)).filter((name) => name !== 'claim.json' && wanted(name));
  const made = await createFromFolder(author, {
    claimJson: () => sheet,
    async eachFile(take) {
      for (const name of names) await take({ name, stream: createReadStream(path.join(SPECIMENS, folder, name)) });
    },
  });
  return must(made).id;
}

export const nameCoAuthor = async (author: SignedInActor, id: string, email: string): Promise<void> => void must(await addCoAuthor(author, id, { email }));

export async function checkWell(room: DemoRoom, author: SignedInActor, id: string): Promise<void> {
  await room.compute(must(await checkDraft(author, id)).runId);
}

/** Checked, lodged, and officially computed: in Triage. */
export async function lodge(room: DemoRoom, author: SignedInActor, id: string): Promise<void> {
  await checkWell(room, author, id);
  await room.compute(must(await lodgeSubmission(author, id)).runId);
}
