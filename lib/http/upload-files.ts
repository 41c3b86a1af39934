import type { Readable } from 'node:stream';
import { maxSheetBytes } from '@/lib/claims/sheet-text';
import type { Result } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { AppFailure } from '@/lib/services/app-error';
import { addFiles } from '@/lib/services/files/add-files';
import { isZip, unpackZip } from '@/lib/services/files/unpack-zip';
import { createFromFolder } from '@/lib/services/submissions/load-sheet';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { DoorError } from './problem-response';
import { readUpload, type UploadPart } from './read-upload';
import type { UploadParts } from './upload-parts';

/** Files of one request into a draft, all or none. Who may not add is told before a byte is read. */
export function uploadFiles(actor: Actor, submissionId: string, request: Request, parts?: UploadParts): Promise<Result<readonly FileView[], DoorError>> {
  return unlessBroken(() =>
    addFiles(actor, submissionId, async (take) => {
      const read = await readUpload(request, ({ name, stream }) => take({ name, stream }), () => undefined, parts);
      if (!read.ok) throw new BadUpload(read.error);
    }),
  );
}

/** A claim sheet with its files, or the same as one archive, becomes a draft. */
export function uploadFolder(actor: Actor, request: Request, parts?: UploadParts): Promise<Result<{ readonly id: string }, DoorError>> {
  let claimJson: string | null = null;
  const isClaim = (name: string, field: string): boolean => field === 'claim' || name === 'claim.json';
  return unlessBroken(() =>
    createFromFolder(actor, {
      claimJson: () => claimJson,
      eachFile: async (take) => {
        const sort = async ({ field, name, stream }: UploadPart): Promise<void> => {
          if (isZip(name)) await unpackZip(stream, (entry) => sort({ field: '', ...entry }));
          else if (isClaim(name, field)) claimJson = await sheetText(stream);
          else await take({ name, stream });
        };
        const named = (name: string, value: string): void => {
          if (name === 'claim') claimJson = value;
        };
        const read = await readUpload(request, sort, named, parts);
        if (!read.ok) throw new BadUpload(read.error);
      },
    }),
  );
}

/** No further than a sheet may go: an archive can unfold to more than memory holds. */
async function sheetText(stream: Readable): Promise<string> {
  const chunks: Buffer[] = [];
  let bytes = 0;
  for await (const chunk of stream as AsyncIterable<Buffer>) {
    bytes += chunk.byteLength;
    if (bytes > maxSheetBytes) throw new BadUpload({ code: 'too-large', sentence: `The claim sheet is longer than ${maxSheetBytes} bytes, more than a sheet may have. Nothing was kept; send waveforms and curves as files of their own.` });
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString('utf8');
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
