'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { say } from '@/app/_ui/primitives/toaster';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { NamedFile } from '../../preview/preview-message';
import { removeFile, restoreFile } from '../actions';
import { previewFile, type Preview } from './preview-table';
import { sendFile } from './upload';

export interface Sending {
  readonly label: string;
  readonly fraction: number;
  readonly doing: string;
}

interface UploadsOptions {
  readonly id: string;
  readonly files: readonly FileView[];
  /** Each file as it is in this browser, for a look before the server has it. */
  readonly onGiven: (files: readonly NamedFile[]) => void;
  readonly onSheet: (text: string) => void;
}

/** Files on their way, one after the other; what stood in the way; and the way back after a removal. */
export function useUploads({ id, files, onGiven, onSheet }: UploadsOptions) {
  const router = useRouter();
  const [steps, setSteps] = useState<Readonly<Record<string, Sending>>>({});
  const [trouble, setTrouble] = useState<readonly string[]>([]);
  const [previews, setPreviews] = useState<Readonly<Record<string, Preview>>>({});
  const under = useRef<AbortController | null>(null);

  const sendOne = async (sent: NamedFile, signal: AbortSignal): Promise<void> => {
    const { name } = sent;
    void previewFile(name, sent.file).then((preview) => setPreviews((now) => ({ ...now, [name]: preview })));
    const onProgress = (fraction: number, doing: string) => setSteps((now) => ({ ...now, [name]: { label: name, fraction, doing } }));
    const outcome = await sendFile(id, sent, files, { onProgress, signal });
    setSteps(({ [name]: _done, ...rest }) => rest);
    if (!outcome.ok) setTrouble((now) => [...now, outcome.sentence]);
  };

  const send = async (given: readonly NamedFile[]): Promise<void> => {
    if (given.length === 0) return;
    setTrouble([]);
    const sheet = given.find(({ name }) => name === 'claim.json');
    const others = given.filter((one) => one !== sheet);
    onGiven(others);
    under.current = new AbortController();
    for (const one of others) if (!under.current.signal.aborted) await sendOne(one, under.current.signal);
    if (sheet) onSheet(await sheet.file.text());
    router.refresh();
  };

  const remove = async ({ id: fileId, name }: FileView): Promise<void> => {
    const removed = await removeFile({ id, name }).catch(() => null);
    if (!removed?.ok) return setTrouble([removed ? removed.error.sentence : `${name} could not be removed; try again.`]);
    say(`${name} is removed.`, () => void restore(fileId, name));
    router.refresh();
  };

  const restore = async (fileId: string, name: string): Promise<void> => {
    const back = await restoreFile({ id, fileId, name }).catch(() => null);
    if (back?.ok) say(`${name} is back.`);
    else setTrouble([back ? back.error.sentence : `${name} could not be brought back; try again, or add it anew.`]);
    router.refresh();
  };

  return { steps, trouble, previews, send, remove, stop: () => under.current?.abort() };
}
