'use client';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useRef, useState, type RefObject } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { ProgressBar } from '@/app/_ui/primitives/progress';
import { Trouble } from '../act-parts';
import { createDraft } from '../compose/actions';
import { nameFiles } from '../preview/named-files';
import type { NamedFile } from '../preview/preview-message';
import { useAct } from '../use-act';
import { LookFirst } from './look-first';
import { sendFolder } from './send-folder';

/** An empty draft, a whole claim-sheet folder (or its archive) as a draft, or first a look at one. */
export function NewSubmission() {
  const router = useRouter();
  const open = (id: string) => router.push(`/compose/${id}` as Route);
  const making = useAct(createDraft, ({ id }) => open(id));
  const [fraction, setFraction] = useState<number | null>(null);
  const [trouble, setTrouble] = useState<readonly string[] | null>(null);
  const [chosen, setChosen] = useState<readonly NamedFile[]>([]);
  const [folder, archive, lookFolder, lookArchive] = [useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null)];
  const send = async (files: readonly NamedFile[]) => {
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
      <Picker at={folder} label="Claim-sheet folder to load" whole onPick={(files) => void send(files)} />
      <Picker at={archive} label="Zip archive to load" onPick={(files) => void send(files)} />
      <Picker at={lookFolder} label="Claim-sheet folder to look at" whole onPick={setChosen} />
      <Picker at={lookArchive} label="Zip archive to look at" onPick={setChosen} />
      {fraction !== null && <div className="max-w-measure"><ProgressBar label="Folder on its way" fraction={fraction} /></div>}
      <Trouble trouble={trouble ?? making.trouble} />
      <LookFirst chosen={chosen} onChoose={setChosen} onPickFolder={() => lookFolder.current?.click()} onPickArchive={() => lookArchive.current?.click()} onDraft={(files) => void send(files)} />
    </div>
  );
}

interface PickerProps {
  readonly at: RefObject<HTMLInputElement | null>;
  readonly label: string;
  /** A folder; else one archive. */
  readonly whole?: boolean;
  readonly onPick: (files: readonly NamedFile[]) => void;
}

const Picker = ({ at, label, whole, onPick }: PickerProps) => (
  <input ref={at} type="file" className="sr-only" aria-label={label} tabIndex={-1} {...(whole ? { webkitdirectory: '', multiple: true } : { accept: '.zip' })} onChange={(e) => { onPick(nameFiles(e.target.files)); e.target.value = ''; }} />
);
