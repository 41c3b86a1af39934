'use client';
import { folderFault } from '../preview/named-files';
import type { NamedFile } from '../preview/preview-message';

export type Sent = { readonly ok: true; readonly id: string } | { readonly ok: false; readonly sentences: readonly string[] };

interface Refusal {
  readonly detail?: string;
  readonly title?: string;
  readonly problems?: readonly { readonly where: string; readonly saw: string; readonly expected: string }[];
}

/** A folder with its claim.json, or one archive, in a single request: it becomes a draft, or nothing does. */
export function sendFolder(files: readonly NamedFile[], onProgress: (fraction: number) => void): Promise<Sent> {
  const fault = folderFault(files);
  if (fault !== null) return Promise.resolve({ ok: false, sentences: [fault] });
  const form = new FormData();
  for (const { name, file } of files) form.append('file', file, name);
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('POST', '/api/v1/submissions');
    request.upload.onprogress = (event) => { if (event.lengthComputable) onProgress(event.loaded / event.total); };
    request.onload = () => resolve(read(request));
    request.onerror = () => resolve({ ok: false, sentences: ['The folder did not arrive: the connection broke. Nothing was kept; send it again.'] });
    request.send(form);
  });
}

function read(request: XMLHttpRequest): Sent {
  let body: unknown = null;
  try { body = JSON.parse(request.responseText); } catch { /* Told by the status below. */ }
  const { id } = (body ?? {}) as { readonly id?: string };
  if (request.status === 201 && id) return { ok: true, id };
  const { detail, title, problems = [] } = (body ?? {}) as Refusal;
  return { ok: false, sentences: [detail ?? title ?? `The server refused the folder (${request.status}).`, ...problems.map((p) => `${p.where}: saw ${p.saw}; expected ${p.expected}.`)] };
}
