'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import type { FileView } from '@/lib/services/submissions/submission-view';
import type { NamedFile } from '../../preview/preview-message';
import { PreviewPanel } from '../../preview/preview-panel';
import { usePreview } from '../../preview/use-preview';
import { fileHere, namedIn } from './browser-files';
import { sheetOf } from './use-import';
import type { ComposerForm } from './waveform-part';

interface PreviewPartProps {
  readonly id: string;
  readonly form: ComposerForm;
  readonly files: readonly FileView[];
  /** What this browser was given since the page was opened. */
  readonly given: ReadonlyMap<string, Blob>;
  readonly onGiven: (files: readonly NamedFile[]) => void;
}

/** A look at the draft as it stands in the form, saved or not, over files that are in this browser. */
export function PreviewPart({ id, form, files, given, onGiven }: PreviewPartProps) {
  const { state, start, cancel } = usePreview();
  const [fetching, setFetching] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [waveforms, noise] = form.watch(['waveforms', 'noise']);
  const wanted = namedIn({ waveforms, noise });
  const here = (name: string): Blob | null => fileHere(name, given, files);
  const away = files.filter(({ name }) => wanted.includes(name) && here(name) === null);
  const look = () => start({ kind: 'files', sheet: sheetOf(form.getValues()), files: wanted.flatMap((name) => { const file = here(name); return file ? [{ name, file }] : []; }) });
  const fetchAway = async () => {
    setFetching(true);
    const got = await Promise.all(away.map(async ({ id: fileId, name }) => {
      const response = await fetch(`/api/v1/submissions/${id}/files/${fileId}`).catch(() => null);
      return response?.ok ? { name, file: await response.blob() } : null;
    }));
    setFetching(false);
    const arrived = got.filter((one) => one !== null);
    setTrouble(arrived.length < away.length ? 'Not every file came back from the server. Try again.' : null);
    onGiven(arrived);
  };
  const megabytes = away.reduce((sum, { bytes }) => sum + bytes, 0) / 1e6;
  return (
    <div className="grid gap-3">
      <p className="max-w-measure text-ui text-ink-2">This browser computes route A of each claim as it stands in the form, in seconds and without sending anything. It says nothing of the uncertainty; the check does.</p>
      {away.length > 0 && <p className="text-ui">Not in this browser: {away.map(({ name }) => name).join(', ')}. A look needs {away.length === 1 ? 'it' : 'them'} here, and so does what the data say of {away.length === 1 ? 'its' : 'their'} declaration before a check; nothing is fetched unless you say so.</p>}
      <div className="flex flex-wrap gap-2">
        <Button tone={away.length === 0 ? 'main' : 'plain'} aria-disabled={away.length > 0 || undefined} busy={state.kind === 'running' ? 'Looking' : null} onClick={() => { if (away.length === 0) look(); }}>Look now</Button>
        {away.length > 0 && <Button tone="main" busy={fetching ? 'Fetching' : null} onClick={() => void fetchAway()}>Fetch {away.length === 1 ? 'the file' : `${away.length} files`}, {megabytes < 0.1 ? 'less than 0.1' : megabytes.toFixed(1)} MB</Button>}
      </div>
      {trouble && <p role="alert" className="text-ui text-differs">{trouble}</p>}
      <PreviewPanel state={state} onCancel={cancel} />
    </div>
  );
}
