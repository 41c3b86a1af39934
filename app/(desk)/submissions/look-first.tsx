'use client';
import { useState, type DragEvent } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { classes } from '@/app/_ui/primitives/classes';
import { Trouble } from '../act-parts';
import { droppedFiles, folderFault, soleArchive } from '../preview/named-files';
import type { NamedFile } from '../preview/preview-message';
import { PreviewPanel } from '../preview/preview-panel';
import { usePreview } from '../preview/use-preview';

interface LookFirstProps {
  readonly chosen: readonly NamedFile[];
  readonly onChoose: (files: readonly NamedFile[]) => void;
  /** Opens the browser's own chooser. */
  readonly onPickFolder: () => void;
  readonly onPickArchive: () => void;
  readonly onDraft: (files: readonly NamedFile[]) => void;
}

const sizeText = (files: readonly NamedFile[]): string => `${(files.reduce((sum, { file }) => sum + file.size, 0) / 1e6).toFixed(1)} MB`;

/** Files that lie in this browser alone, until their owner says otherwise. */
export function LookFirst({ chosen, onChoose, onPickFolder, onPickArchive, onDraft }: LookFirstProps) {
  const { state, start, cancel } = usePreview();
  const [over, setOver] = useState(false);
  const [trouble, setTrouble] = useState<readonly string[] | null>(null);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    void droppedFiles(event.dataTransfer).then(onChoose, () => setTrouble(['What was dropped could not be read. Choose it with one of the buttons.']));
  };
  const look = async () => {
    const fault = folderFault(chosen);
    setTrouble(fault === null ? null : [fault]);
    if (fault !== null) return;
    const archive = soleArchive(chosen);
    if (archive) return start({ kind: 'archive', name: archive.name, archive: archive.file });
    const sheet = chosen.find(({ name }) => name === 'claim.json');
    if (sheet) start({ kind: 'files', sheet: new Uint8Array(await sheet.file.arrayBuffer()), files: chosen });
  };
  return (
    <section aria-labelledby="look-h" className="grid gap-3">
      <div onDragOver={(e) => { e.preventDefault(); setOver(true); }} onDragLeave={() => setOver(false)} onDrop={drop} className={classes('grid justify-items-start gap-3 rounded border border-dashed px-5 py-4', over ? 'border-link bg-hover' : 'border-control bg-sheet')}>
        <h2 id="look-h" className="text-h3">The number before it leaves your machine</h2>
        <p className="max-w-measure text-ui">Drop a claim-sheet folder or its zip here. This browser reads it and computes route A of each claim; nothing is sent unless you make a draft of it.</p>
        {chosen.length === 0 ? (
          <div className="flex flex-wrap gap-2"><Button onClick={onPickFolder}>Look at a folder</Button><Button onClick={onPickArchive}>Look at a zip</Button></div>
        ) : (
          <>
            <p className="text-ui [overflow-wrap:anywhere]"><b>{chosen.length} {chosen.length === 1 ? 'file' : 'files'}, {sizeText(chosen)}</b>: {chosen.slice(0, 8).map(({ name }) => name).join(', ')}{chosen.length > 8 && ' and more'}. Nothing has been sent.</p>
            <div className="flex flex-wrap gap-2">
              <Button tone="main" busy={state.kind === 'running' ? 'Looking' : null} onClick={() => void look()}>Look first</Button>
              <Button onClick={() => onDraft(chosen)}>Make a draft</Button>
              <Button tone="quiet" onClick={() => { cancel(); onChoose([]); }}>Put it away</Button>
            </div>
          </>
        )}
      </div>
      <Trouble trouble={trouble} />
      {chosen.length > 0 && <PreviewPanel state={state} onCancel={cancel} />}
    </section>
  );
}
