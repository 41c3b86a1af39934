'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState, type DragEvent } from 'react';
import { Plot } from '@/app/_ui/charts/plot';
import { Button } from '@/app/_ui/primitives/button';
import { Hash } from '@/app/_ui/primitives/facts';
import { Notice } from '@/app/_ui/primitives/notice';
import { ProgressList, type ProgressStep } from '@/app/_ui/primitives/progress';
import { say } from '@/app/_ui/primitives/toaster';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { loadSheet, removeFile } from '../actions';
import { previewFile, type Preview } from './preview-table';
import { nameOf, uploadFile } from './upload';

interface FilesPartProps {
  readonly id: string;
  readonly files: readonly FileView[];
  readonly usedBy: (name: string) => readonly string[];
  readonly version: () => number;
  /** Before a sheet is loaded over the draft, what is open must have reached the server. */
  readonly settle: () => Promise<boolean>;
}

const bytesText = (bytes: number): string => (bytes < 1e4 ? `${bytes} B` : bytes < 1e7 ? `${(bytes / 1e3).toFixed(0)} kB` : `${(bytes / 1e6).toFixed(1)} MB`);

function useUploads({ id, version, settle }: FilesPartProps) {
  const router = useRouter();
  const [steps, setSteps] = useState<Readonly<Record<string, ProgressStep>>>({});
  const [trouble, setTrouble] = useState<readonly string[]>([]);
  const [previews, setPreviews] = useState<Readonly<Record<string, Preview>>>({});
  const kept = useRef(new Map<string, File>());

  const sendOne = async (file: File, name: string): Promise<void> => {
    kept.current.set(name, file);
    void previewFile(name, file).then((preview) => setPreviews((now) => ({ ...now, [name]: preview })));
    const outcome = await uploadFile(id, name, file, (fraction) => setSteps((now) => ({ ...now, [name]: { label: name, fraction } })));
    setSteps(({ [name]: _done, ...rest }) => rest);
    if (!outcome.ok) setTrouble((now) => [...now, outcome.sentence]);
  };

  const send = async (list: readonly File[]): Promise<void> => {
    setTrouble([]);
    const sheet = list.find((f) => nameOf(f) === 'claim.json');
    for (const file of list) if (file !== sheet && !nameOf(file).split('/').some((p) => p.startsWith('.'))) await sendOne(file, nameOf(file));
    if (!sheet) return router.refresh();
    if (!(await settle())) return setTrouble((now) => [...now, 'claim.json was not loaded, since what is open could not be saved first.']);
    const loaded = await loadSheet({ id, version: version(), claimJson: await sheet.text() }).catch(() => null);
    if (loaded?.ok) window.location.reload();
    else setTrouble((now) => [...now, ...(loaded ? [loaded.error.sentence, ...(loaded.error.problems ?? []).map((p) => `${p.where}: saw ${p.saw}; expected ${p.expected}.`)] : ['claim.json could not be sent; try again.'])]);
  };

  const remove = async (name: string): Promise<void> => {
    const removed = await removeFile({ id, name }).catch(() => null);
    if (!removed?.ok) return setTrouble([removed ? removed.error.sentence : `${name} could not be removed; try again.`]);
    const file = kept.current.get(name);
    say(`${name} is removed.`, file ? () => void sendOne(file, name).then(() => router.refresh()) : undefined);
    router.refresh();
  };

  return { steps, trouble, previews, send, remove };
}

/** Drop, stream, hash; and see at once what the file holds. */
export function FilesPart(props: FilesPartProps) {
  const { files, usedBy } = props;
  const { steps, trouble, previews, send, remove } = useUploads(props);
  const [over, setOver] = useState(false);
  const one = useRef<HTMLInputElement>(null);
  const folder = useRef<HTMLInputElement>(null);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    void send([...event.dataTransfer.files]);
  };
  return (
    <div className="grid gap-4">
      <div onDragOver={(e) => { e.preventDefault(); setOver(true); }} onDragLeave={() => setOver(false)} onDrop={drop} className={`grid justify-items-start gap-3 rounded border border-dashed px-5 py-5 ${over ? 'border-link bg-hover' : 'border-control bg-sheet'}`}>
        <p className="max-w-measure">Drop waveforms and noise curves here: text tables, also gzipped. A folder with a <code>claim.json</code> fills all of this page.</p>
        <div className="flex flex-wrap gap-2">
          <Button tone="main" onClick={() => one.current?.click()}>Choose files</Button>
          <Button onClick={() => folder.current?.click()}>Choose a folder</Button>
        </div>
        <input ref={one} type="file" multiple className="sr-only" aria-label="Files to add" tabIndex={-1} onChange={(e) => { void send([...(e.target.files ?? [])]); e.target.value = ''; }} />
        <input ref={folder} type="file" multiple className="sr-only" aria-label="Claim-sheet folder to load" tabIndex={-1} {...{ webkitdirectory: '' }} onChange={(e) => { void send([...(e.target.files ?? [])]); e.target.value = ''; }} />
      </div>
      {Object.keys(steps).length > 0 && <ProgressList label="Files on their way" steps={Object.values(steps)} />}
      {trouble.length > 0 && <Notice kind="stop" live="alert" word="Not done">{trouble.map((t) => <p key={t}>{t}</p>)}</Notice>}
      <ul className="grid gap-3">
        {files.map((file) => <FileRow key={file.id} file={file} preview={previews[file.name]} usedBy={usedBy(file.name)} onRemove={() => void remove(file.name)} />)}
      </ul>
    </div>
  );
}

function FileRow({ file, preview, usedBy, onRemove }: { readonly file: FileView; readonly preview: Preview | undefined; readonly usedBy: readonly string[]; readonly onRemove: () => void }) {
  return (
    <li className="grid min-w-0 gap-2 rounded border border-hair-2 bg-sheet px-4 py-3">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <strong className="[overflow-wrap:anywhere]">{file.name}</strong>
        <span className="text-ui text-ink-2">{bytesText(file.bytes)} · {usedBy.length > 0 ? `used as ${usedBy.join(', ')}` : 'not used yet'}</span>
        <span className="ml-auto"><Button size="low" tone="quiet" onClick={onRemove} aria-label={`Remove ${file.name}`}>Remove</Button></span>
      </div>
      <Hash value={file.sha256} />
      {preview?.ok && (
        <>
          <p className="text-small text-ink-2">{preview.rows.toLocaleString('en-GB')} rows, {preview.columns} columns; the first column runs from {preview.first} to {preview.last}</p>
          <Plot claimId={`file-${file.id}`} figure={preview.figure} stills={[]} />
        </>
      )}
      {preview && !preview.ok && <Notice kind="look">{preview.sentences.map((s) => <p key={s}>{s}</p>)}</Notice>}
    </li>
  );
}
