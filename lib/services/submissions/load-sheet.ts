import { z } from 'zod';
import { storeFile, type UploadedFile } from '@/db/writes/files/store-file';
import { createSubmission } from '@/db/writes/submissions/create-submission';
import { parseSheetText } from '@/lib/claims/sheet-text';
import type { Problem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { actGenerally } from '@/lib/services/act';
import { AppFailure, fail, type Outcome } from '@/lib/services/app-error';
import { discardStaged, MAX_FILES, stageFile, type Incoming } from '@/lib/services/files/stage-file';

/** Enough shape to be edited; what the words mean is judged by the check, with every problem listed. */
const loadable = z.looseObject({
  format: z.literal('counterfoil-claim/1'),
  title: z.string().max(300).default(''),
  statement: z.string().max(100_000).default(''),
  waveforms: z.record(z.string(), z.looseObject({})).default({}),
  noise: z.record(z.string(), z.looseObject({})).default({}),
  claims: z.array(z.looseObject({})).max(200).default([]),
});
type Loadable = z.infer<typeof loadable>;

export function readSheetText(text: string): Outcome<Loadable> {
  const json = parseSheetText(new TextEncoder().encode(text));
  if (!json.ok) return fail('invalid', 'claim.json cannot be read.', json.error);
  const sheet = loadable.safeParse(json.value);
  if (sheet.success) return ok(sheet.data);
  const problems = sheet.error.issues.map((i): Problem => ({ code: 'claims/shape', where: `/${i.path.map(String).join('/')}`, saw: 'something else', expected: i.message }));
  return fail('invalid', 'claim.json is not a claim sheet of the format counterfoil-claim/1.', problems);
}

export interface Folder {
  /** Text of `claim.json`, once it has come by; files may come before or after it. */
  readonly claimJson: () => string | null;
  /** Hands over one file after the other; an error of `take` ends the walk. */
  readonly eachFile: (take: (file: Incoming) => Promise<void>) => Promise<void>;
}

/** A whole claim-sheet folder at once: a draft with sheet and files, or nothing. */
export async function createFromFolder(actor: Actor, folder: Folder): Promise<Outcome<{ readonly id: string }>> {
  const allowed = mayGenerally('submission.create', actor);
  if (!allowed.ok) return allowed;
  const staged: UploadedFile[] = [];
  let made: Outcome<{ readonly id: string }> | null = null;
  try {
    await folder.eachFile((file) => stageInto(staged, file));
    made = await recordFolder(actor, folder.claimJson(), staged);
  } catch (cause) {
    if (!(cause instanceof AppFailure)) throw cause;
    made = { ok: false, error: cause.error };
  } finally {
    await discardStaged(staged);
  }
  return made;
}

async function stageInto(staged: UploadedFile[], file: Incoming): Promise<void> {
  if (staged.length >= MAX_FILES) throw new AppFailure({ code: 'limit', sentence: `A submission holds at most ${MAX_FILES} files.` });
  const one = await stageFile(file);
  if (!one.ok) throw new AppFailure(one.error);
  staged.push(one.value);
}

async function recordFolder(actor: Actor, claimJson: string | null, files: readonly UploadedFile[]): Promise<Outcome<{ readonly id: string }>> {
  if (claimJson === null) return fail('invalid', 'No claim.json came with the files. Send it as the field "claim".');
  const sheet = readSheetText(claimJson);
  if (!sheet.ok) return sheet;
  return actGenerally({ actor, action: 'submission.create' }, async ({ tx, grant, note }) => {
    const { title, statement } = sheet.value;
    const made = await createSubmission(tx, grant, { title, statement, sheet: sheet.value });
    for (const file of files) await storeFile(tx, grant, made, file);
    note('submission', made.submissionId, { files: files.length });
    return ok({ id: made.submissionId });
  });
}
