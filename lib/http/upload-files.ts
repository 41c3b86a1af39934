import { text } from 'node:stream/consumers';
import { ok, type Result } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { AppFailure } from '@/lib/services/app-error';
import { addFile, mayAdd } from '@/lib/services/files/add-file';
import { isZip, unpackZip } from '@/lib/services/files/unpack-zip';
import { createFromFolder } from '@/lib/services/submissions/load-sheet';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { DoorError } from './problem-response';
import { readUpload, type UploadPart } from './read-upload';

/** Files of one request into a draft. Who may not add is told before a byte is stored. */
export async function uploadFiles(actor: Actor, submissionId: string, request: Request): Promise<Result<readonly FileView[], DoorError>> {
  const open = await mayAdd(actor, submissionId, '');
  if (!open.ok) return open;
  const stored: FileView[] = [];
  return unlessBroken(async () => {
    const read = await readUpload(request, async ({ name, stream }) => {
      const added = await addFile(actor, submissionId, { name, stream });
      if (!added.ok) throw new AppFailure(added.error);
      stored.push(added.value);
    });
    if (!read.ok) return read;
    return stored.length > 0 ? ok(stored) : { ok: false, error: { code: 'invalid', sentence: 'No file came with the request.' } };
  });
}

/** A claim sheet with its files, or the same as one archive, becomes a draft. */
export function uploadFolder(actor: Actor, request: Request): Promise<Result<{ readonly id: string }, DoorError>> {
  let claimJson: string | null = null;
  const isClaim = (name: string, field: string): boolean => field === 'claim' || name === 'claim.json';
  return unlessBroken(() =>
    createFromFolder(actor, {
      claimJson: () => claimJson,
      eachFile: async (take) => {
        const sort = async ({ field, name, stream }: UploadPart): Promise<void> => {
          if (isZip(name)) await unpackZip(stream, (entry) => sort({ field: '', ...entry }));
          else if (isClaim(name, field)) claimJson = await text(stream);
          else await take({ name, stream });
        };
        const read = await readUpload(request, sort, (name, value) => {
          if (name === 'claim') claimJson = value;
        });
        if (!read.ok) throw new BadUpload(read.error);
      },
    }),
  );
}

class BadUpload extends Error {
  constructor(readonly error: DoorError) {
    super(error.sentence);
  }
}

/** A sender who goes away or sends half a body is told so; anything else is a defect. */
async function unlessBroken<T>(work: () => Promise<Result<T, DoorError>>): Promise<Result<T, DoorError>> {
  try {
    return await work();
  } catch (cause) {
    if (cause instanceof AppFailure || cause instanceof BadUpload) return { ok: false, error: cause.error };
    if (cause instanceof Error && /Unexpected end of (form|file)|aborted|terminated|Premature close/i.test(cause.message))
      return { ok: false, error: { code: 'invalid', sentence: 'The upload ended early. Nothing of the file was kept; send it again.' } };
    throw cause;
  }
}
