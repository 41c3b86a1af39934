'use client';
import { Sha256 } from '@/lib/formats/sha256';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { NamedFile } from '../../preview/preview-message';
import { sendInParts } from './long-upload';

export type UploadOutcome = { readonly ok: true } | { readonly ok: false; readonly sentence: string };

export interface UploadWatch {
  readonly onProgress: (fraction: number, doing: string) => void;
  readonly signal: AbortSignal;
}

/** From here on a file goes in parts, so that a broken connection does not cost all of it. */
export const LONG_BYTES = 8 * 1024 * 1024;

/** Sends what is not here yet: the same bytes under the same name are told by their hash and left alone. */
export async function sendFile(submissionId: string, sent: NamedFile, here: readonly FileView[], watch: UploadWatch): Promise<UploadOutcome> {
  const before = here.find(({ name, bytes }) => name === sent.name && bytes === sent.file.size);
  const long = sent.file.size > LONG_BYTES;
  const sha256 = before || long ? await hashOf(sent.file, watch) : null;
  if (watch.signal.aborted) return { ok: false, sentence: `${sent.name} was stopped.` };
  if (before && before.sha256 === sha256) return { ok: true };
  return long && sha256 !== null ? sendInParts(submissionId, sent, sha256, watch) : sendWhole(submissionId, sent, watch);
}

export async function hashOf(file: Blob, { onProgress, signal }: UploadWatch): Promise<string> {
  const digest = new Sha256();
  const reader = file.stream().getReader();
  let bytes = 0;
  for (let part = await reader.read(); !part.done && !signal.aborted; part = await reader.read()) {
    digest.update(part.value);
    bytes += part.value.length;
    onProgress((0.1 * bytes) / file.size, 'reading its hash');
  }
  await reader.cancel().catch(() => undefined);
  return digest.hex();
}

/** A short file in one request, with progress: the browser's fetch cannot tell how much has left. */
function sendWhole(submissionId: string, { name, file }: NamedFile, { onProgress, signal }: UploadWatch): Promise<UploadOutcome> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('POST', `/api/v1/submissions/${submissionId}/files`);
    request.upload.onprogress = (event) => { if (event.lengthComputable) onProgress(event.loaded / event.total, 'sending'); };
    request.onload = () => resolve(request.status >= 200 && request.status < 300 ? { ok: true } : { ok: false, sentence: refusalOf(request.status, request.responseText) });
    request.onerror = () => resolve({ ok: false, sentence: `${name} did not arrive: the connection broke. Send it again; what is here already stays.` });
    request.onabort = () => resolve({ ok: false, sentence: `${name} was stopped.` });
    signal.addEventListener('abort', () => request.abort(), { once: true });
    const form = new FormData();
    form.append('file', file, name);
    request.send(form);
  });
}

/** What the server said, in its own sentence where there is one. */
export function refusalOf(status: number, body: string): string {
  try {
    const { detail, title } = JSON.parse(body) as { readonly detail?: string; readonly title?: string };
    if (detail ?? title) return detail ?? title ?? '';
  } catch {
    /* Told by the status below. */
  }
  return `The server refused the file (${status}).`;
}
