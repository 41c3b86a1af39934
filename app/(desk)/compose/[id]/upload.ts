'use client';
import type { FileView } from '@/lib/services/submissions/submission-view';

export type UploadOutcome = { readonly ok: true; readonly files: readonly FileView[] } | { readonly ok: false; readonly sentence: string };

interface Problem {
  readonly detail?: string;
  readonly title?: string;
}

/** One file, streamed, with progress: the browser's fetch cannot tell how much has left. */
export function uploadFile(submissionId: string, name: string, file: Blob, onProgress: (fraction: number) => void): Promise<UploadOutcome> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('POST', `/api/v1/submissions/${submissionId}/files`);
    request.responseType = 'text';
    request.upload.onprogress = (event) => { if (event.lengthComputable) onProgress(event.loaded / event.total); };
    request.onload = () => resolve(read(request));
    request.onerror = () => resolve({ ok: false, sentence: `${name} did not arrive: the connection broke. Send it again; what is here already stays.` });
    const form = new FormData();
    form.append('file', file, name);
    request.send(form);
  });
}

function read(request: XMLHttpRequest): UploadOutcome {
  let body: unknown = null;
  try { body = JSON.parse(request.responseText); } catch { /* Told below by the status. */ }
  if (request.status >= 200 && request.status < 300) return { ok: true, files: Array.isArray(body) ? (body as FileView[]) : ((body as { readonly files?: readonly FileView[] } | null)?.files ?? []) };
  const { detail, title } = (body ?? {}) as Problem;
  return { ok: false, sentence: detail ?? title ?? `The server refused the file (${request.status}).` };
}

/** The name by which a sheet calls a file: its path below the folder that was chosen. */
export function nameOf(file: File): string {
  const path = file.webkitRelativePath || file.name;
  return path.includes('/') ? path.slice(path.indexOf('/') + 1) : path;
}
