import { createReadStream, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { SignedInActor } from '@/lib/policy/actor';
import { answerFinding } from '@/lib/services/submissions/answer-finding';
import { addCoAuthor, confirmAuthorship } from '@/lib/services/submissions/change-people';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { createFromFolder } from '@/lib/services/submissions/load-sheet';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { must, type DemoRoom } from './demo-room';
import { DEMO_PEOPLE, type DemoPerson } from './people';

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

/** A draft of two people who both stand by it. */
export async function loadTogether(author: SignedInActor, partner: SignedInActor, folder: string): Promise<string> {
  const id = await loadSpecimen(author, folder);
  const email = Object.values<DemoPerson>(DEMO_PEOPLE).find(({ name }) => name === partner.name)?.email ?? '';
  await nameCoAuthor(author, id, email);
  must(await confirmAuthorship(partner, id));
  return id;
}

/** The next revision: another statement, other claims, or a setting of theirs. */
export async function restate(author: SignedInActor, id: string, change: { readonly statement: string; readonly claims: (before: readonly DraftClaim[]) => readonly DraftClaim[] }): Promise<void> {
  must(await reviseSubmission(author, id));
  const { revision } = must(await getDraft(author, id));
  const claims = change.claims(revision.sheet.claims as readonly DraftClaim[]);
  must(await updateDraft(author, id, { version: revision.version, statement: change.statement, sheet: { claims: claims as never } }));
}

export interface DraftClaim {
  readonly id: string;
  readonly settings?: Readonly<Record<string, unknown>>;
  readonly [field: string]: unknown;
}

export async function checkWell(room: DemoRoom, author: SignedInActor, id: string): Promise<void> {
  await room.compute(must(await checkDraft(author, id)).runId);
}

/** The invented people's word on whatever the check asked them. */
async function answerAll(author: SignedInActor, id: string): Promise<void> {
  const { check } = must(await getDraft(author, id));
  const found = check?.run.state === 'measured' ? check.run.result.claims.flatMap((claim) => claim.findings) : [];
  const asked = new Map(found.filter((finding) => finding.level === 'needs-answer').map((finding) => [`${finding.code} ${finding.where} ${finding.text}`, finding]));
  for (const { code, where, text } of asked.values()) must(await answerFinding(author, id, { code, where, text, answer: 'The claim is about the signals as attached; the statement says so.' }));
}

/** Checked, lodged, and officially computed: in Triage. */
export async function lodge(room: DemoRoom, author: SignedInActor, id: string): Promise<void> {
  await checkWell(room, author, id);
  await answerAll(author, id);
  await room.compute(must(await lodgeSubmission(author, id)).runId);
}
