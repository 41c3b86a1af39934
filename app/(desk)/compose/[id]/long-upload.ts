'use client';
import type { BegunUpload } from '@/lib/services/files/begin-upload';
import type { UploadView } from '@/lib/services/files/upload-view';
import type { NamedFile } from '../../preview/preview-message';
import { refusalOf, type UploadOutcome, type UploadWatch } from './upload';

const TRIES = 6;
const LONGEST_PAUSE_MS = 15_000;

const addressOf = (submissionId: string, uploadId = ''): string => `/api/v1/submissions/${submissionId}/uploads${uploadId && `/${uploadId}`}`;

/**
 * A long file, part by part. The server says which parts it has, so that the same file, chosen again
 * after a reload or in another browser, goes on where it broke off.
 */
export async function sendInParts(submissionId: string, { name, file }: NamedFile, sha256: string, watch: UploadWatch): Promise<UploadOutcome> {
  const begun = await ask<BegunUpload>(addressOf(submissionId), { name, bytes: file.size, sha256 }, watch);
  if (!begun.ok) return begun;
  const { upload } = begun.value;
  if (upload === null) return { ok: true };
  const parts = Math.ceil(upload.bytes / upload.partBytes);
  const arrived = new Set(upload.arrived);
  for (let number = 0; number < parts; number++) {
    if (arrived.has(number)) continue;
    const failed = await sendPart(submissionId, upload, number, file, { parts, arrived: arrived.size }, watch);
    if (failed) return failed;
    arrived.add(number);
  }
  watch.onProgress(1, 'putting the parts together');
  const finished = await ask(addressOf(submissionId, upload.id), {}, watch);
  return finished.ok ? { ok: true } : finished;
}

interface Standing {
  readonly parts: number;
  readonly arrived: number;
}

/** Null when it has arrived. A broken connection is tried again; a refusal is not. */
async function sendPart(submissionId: string, upload: UploadView, number: number, file: Blob, { parts, arrived }: Standing, watch: UploadWatch): Promise<(UploadOutcome & { ok: false }) | null> {
  const body = file.slice(number * upload.partBytes, (number + 1) * upload.partBytes);
  for (let tries = 1; ; tries++) {
    const put = await putPart(`${addressOf(submissionId, upload.id)}/parts/${number}`, body, (sent) => watch.onProgress(0.1 + (0.9 * (arrived + sent)) / parts, `part ${number + 1} of ${parts}`), watch.signal);
    if (put.status >= 200 && put.status < 300) return null;
    if (watch.signal.aborted) return { ok: false, sentence: `${upload.name} was stopped; ${arrived} of ${parts} parts are here.` };
    if (put.status !== 0 && put.status < 500) return { ok: false, sentence: refusalOf(put.status, put.text) };
    if (tries === TRIES) return { ok: false, sentence: `${upload.name} did not arrive in full: the connection broke. ${arrived} of ${parts} parts are here and are kept for three days; choose the same file again and the rest is sent.` };
    watch.onProgress(0.1 + (0.9 * arrived) / parts, `waiting for the connection; ${arrived} of ${parts} parts are here`);
    await pause(Math.min(LONGEST_PAUSE_MS, 500 * 2 ** tries), watch.signal);
  }
}

function putPart(address: string, body: Blob, onSent: (fraction: number) => void, signal: AbortSignal): Promise<{ readonly status: number; readonly text: string }> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('PUT', address);
    request.setRequestHeader('content-type', 'application/octet-stream');
    request.upload.onprogress = (event) => { if (event.lengthComputable) onSent(event.loaded / event.total); };
    request.onloadend = () => resolve({ status: request.status, text: request.responseText });
    signal.addEventListener('abort', () => request.abort(), { once: true });
    request.send(body);
  });
}

/** Ends early when the connection is back, or when the sender gives up. */
function pause(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const go = () => {
      clearTimeout(timer);
      window.removeEventListener('online', go);
      resolve();
    };
    const timer = setTimeout(go, ms);
    window.addEventListener('online', go);
    signal.addEventListener('abort', go, { once: true });
  });
}

type Answer<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly sentence: string };

async function ask<T>(address: string, body: unknown, { signal }: UploadWatch): Promise<Answer<T>> {
  for (let tries = 1; tries <= TRIES && !signal.aborted; tries++) {
    const response = await fetch(address, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body), signal }).catch(() => null);
    if (response?.ok) return { ok: true, value: (await response.json()) as T };
    if (response && response.status < 500) return { ok: false, sentence: refusalOf(response.status, await response.text()) };
    await pause(Math.min(LONGEST_PAUSE_MS, 500 * 2 ** tries), signal);
  }
  return { ok: false, sentence: 'The server could not be reached. What has arrived is kept for three days; choose the same file again when you are online.' };
}

/** True when the server has let go of it. */
export const letGo = async (submissionId: string, uploadId: string): Promise<boolean> =>
  (await fetch(addressOf(submissionId, uploadId), { method: 'DELETE' }).catch(() => null))?.ok ?? false;
