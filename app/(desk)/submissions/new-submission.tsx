'use client';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useRef, useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { ProgressBar } from '@/app/_ui/primitives/progress';
import { Trouble } from '../act-parts';
import { createDraft } from '../compose/actions';
import { useAct } from '../use-act';
import { sendFolder } from './send-folder';

/** An empty draft, or a whole claim-sheet folder (or its archive) as a draft. */
export function NewSubmission() {
  const router = useRouter();
  const open = (id: string) => router.push(`/compose/${id}` as Route);
  const making = useAct(createDraft, ({ id }) => open(id));
  const [fraction, setFraction] = useState<number | null>(null);
  const [trouble, setTrouble] = useState<readonly string[] | null>(null);
  const folder = useRef<HTMLInputElement>(null);
  const archive = useRef<HTMLInputElement>(null);
  const send = async (list: FileList | null) => {
    const files = [...(list ?? [])];
    if (files.length === 0) return;
    setTrouble(null);
    setFraction(0);
    const sent = await sendFolder(files, setFraction);
    setFraction(null);
    if (sent.ok) open(sent.id);
    else setTrouble(sent.sentences);
  };
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap gap-2">
        <Button tone="main" busy={making.busy ? 'Opening' : null} onClick={() => void making.run({})}>New submission</Button>
        <Button busy={fraction === null ? null : 'Sending'} onClick={() => folder.current?.click()}>Load a claim-sheet folder</Button>
        <Button busy={fraction === null ? null : 'Sending'} onClick={() => archive.current?.click()}>Load a zip of one</Button>
      </div>
      <input ref={folder} type="file" multiple className="sr-only" aria-label="Claim-sheet folder to load" tabIndex={-1} {...{ webkitdirectory: '' }} onChange={(e) => { void send(e.target.files); e.target.value = ''; }} />
      <input ref={archive} type="file" accept=".zip" className="sr-only" aria-label="Zip archive to load" tabIndex={-1} onChange={(e) => { void send(e.target.files); e.target.value = ''; }} />
      {fraction !== null && <div className="max-w-measure"><ProgressBar label="Folder on its way" fraction={fraction} /></div>}
      <Trouble trouble={trouble ?? making.trouble} />
    </div>
  );
}
