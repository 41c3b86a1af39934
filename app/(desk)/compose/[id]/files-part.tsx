'use client';
import { useRef, useState, type DragEvent } from 'react';
import { Plot } from '@/app/_ui/charts/plot';
import { Button } from '@/app/_ui/primitives/button';
import { Hash } from '@/app/_ui/primitives/facts';
import { Notice } from '@/app/_ui/primitives/notice';
import { ProgressList } from '@/app/_ui/primitives/progress';
import type { UploadView } from '@/lib/services/files/upload-view';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { droppedFiles, nameFiles } from '../../preview/named-files';
import type { NamedFile } from '../../preview/preview-message';
import { ImportNotice } from './import-notice';
import { InterruptedUploads } from './interrupted-uploads';
import type { Preview } from './preview-table';
import type { useImport } from './use-import';
import { useUploads } from './use-uploads';

interface FilesPartProps {
  readonly id: string;
  readonly files: readonly FileView[];
  readonly uploads: readonly UploadView[];
  readonly usedBy: (name: string) => readonly string[];
  readonly onGiven: (files: readonly NamedFile[]) => void;
  readonly importing: ReturnType<typeof useImport>;
}

const bytesText = (bytes: number): string => (bytes < 1e4 ? `${bytes} B` : bytes < 1e7 ? `${(bytes / 1e3).toFixed(0)} kB` : `${(bytes / 1e6).toFixed(1)} MB`);

/** Drop, stream, hash; and see at once what the file holds. */
export function FilesPart({ id, files, uploads, usedBy, onGiven, importing }: FilesPartProps) {
  const { steps, trouble, previews, send, remove, stop } = useUploads({ id, files, onGiven, onSheet: importing.take });
  const [over, setOver] = useState(false);
  const [one, folder, sheet] = [useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null)];
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    void droppedFiles(event.dataTransfer).then(send);
  };
  const under = Object.values(steps);
  return (
    <div className="grid gap-4">
      <div onDragOver={(e) => { e.preventDefault(); setOver(true); }} onDragLeave={() => setOver(false)} onDrop={drop} className={`grid justify-items-start gap-3 rounded border border-dashed px-5 py-5 ${over ? 'border-link bg-hover' : 'border-control bg-sheet'}`}>
        <p className="max-w-measure">Drop waveforms and noise curves here: text tables, also gzipped, or files of arrays (.h5, .npz, .npy). A folder with a <code>claim.json</code> fills all of this page.</p>
        <div className="flex flex-wrap gap-2">
          <Button tone="main" onClick={() => one.current?.click()}>Choose files</Button>
          <Button onClick={() => folder.current?.click()}>Choose a folder</Button>
          <Button onClick={() => sheet.current?.click()}>Import claim.json</Button>
        </div>
        <input ref={one} type="file" multiple className="sr-only" aria-label="Files to add" tabIndex={-1} onChange={(e) => { void send(nameFiles(e.target.files)); e.target.value = ''; }} />
        <input ref={folder} type="file" multiple className="sr-only" aria-label="Claim-sheet folder to load" tabIndex={-1} {...{ webkitdirectory: '' }} onChange={(e) => { void send(nameFiles(e.target.files)); e.target.value = ''; }} />
        <input ref={sheet} type="file" accept=".json" className="sr-only" aria-label="claim.json to import" tabIndex={-1} onChange={(e) => { void e.target.files?.[0]?.text().then(importing.take); e.target.value = ''; }} />
      </div>
      {under.length > 0 && (
        <div className="grid gap-2">
          <ProgressList label="Files on their way" steps={under} />
          <p role="status" className="text-small text-ink-2">{under.map(({ label, doing }) => `${label}: ${doing}`).join('; ')}</p>
          <div><Button size="low" onClick={stop}>Stop sending</Button></div>
        </div>
      )}
      <ImportNotice state={importing} />
      <InterruptedUploads id={id} uploads={uploads} under={Object.keys(steps)} onSend={send} />
      {trouble.length > 0 && <Notice kind="stop" live="alert" word="Not done">{trouble.map((t) => <p key={t}>{t}</p>)}</Notice>}
      <ul className="grid gap-3">
        {files.map((file) => <FileRow key={file.name} file={file} preview={previews[file.name]} usedBy={usedBy(file.name)} onRemove={() => void remove(file)} />)}
      </ul>
    </div>
  );
}

function FileRow({ file, preview, usedBy, onRemove }: { readonly file: FileView; readonly preview: Preview | undefined; readonly usedBy: readonly string[]; readonly onRemove: () => void }) {
  return (
    <li data-listed tabIndex={-1} className="grid min-w-0 gap-2 rounded border border-hair-2 bg-sheet px-4 py-3">
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
