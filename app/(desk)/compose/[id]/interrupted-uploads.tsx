'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import type { UploadView } from '@/lib/services/files/upload-view';
import type { NamedFile } from '../../preview/preview-message';
import { letGo } from './long-upload';
import { hashOf } from './upload';

interface InterruptedProps {
  readonly id: string;
  readonly uploads: readonly UploadView[];
  /** Names of files on their way now: those are not interrupted. */
  readonly under: readonly string[];
  readonly onSend: (files: readonly NamedFile[]) => Promise<void>;
}

/** Long files whose sending broke off. A browser cannot open a file again by itself after a reload, so its owner is asked for it. */
export function InterruptedUploads({ id, uploads, under, onSend }: InterruptedProps) {
  return uploads.filter(({ name }) => !under.includes(name)).map((upload) => <Interrupted key={upload.id} id={id} upload={upload} onSend={onSend} />);
}

function Interrupted({ id, upload, onSend }: Omit<InterruptedProps, 'uploads' | 'under'> & { readonly upload: UploadView }) {
  const router = useRouter();
  const picker = useRef<HTMLInputElement>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [reading, setReading] = useState(false);
  const parts = Math.ceil(upload.bytes / upload.partBytes);
  const goOn = async (file: File | undefined) => {
    if (!file) return;
    setReading(true);
    const same = file.size === upload.bytes && (await hashOf(file, { onProgress: () => undefined, signal: new AbortController().signal })) === upload.sha256;
    setReading(false);
    setTrouble(same ? null : `${file.name} is another file: its bytes are not those of the upload that broke off. It was not sent. Choose the file that was sent first, or let that upload go.`);
    if (same) await onSend([{ name: upload.name, file }]);
  };
  const drop = async () => {
    if (await letGo(id, upload.id)) router.refresh();
    else setTrouble('The server could not be reached; the upload is still kept.');
  };
  const actions = (
    <>
      <Button size="low" tone="main" busy={reading ? 'Comparing' : null} onClick={() => picker.current?.click()}>Choose {upload.name} again</Button>
      <Button size="low" onClick={() => void drop()}>Let it go</Button>
    </>
  );
  return (
    <Notice kind="look" word="Broken off" actions={actions}>
      <p>{upload.arrived.length} of {parts} parts of {upload.name} are here; its upload broke off. Choose the same file again and only the rest is sent.</p>
      {trouble && <p role="alert" className="mt-1 text-differs">{trouble}</p>}
      <input ref={picker} type="file" className="sr-only" tabIndex={-1} aria-label={`${upload.name}, to go on with its upload`} onChange={(e) => { void goOn(e.target.files?.[0]); e.target.value = ''; }} />
    </Notice>
  );
}
