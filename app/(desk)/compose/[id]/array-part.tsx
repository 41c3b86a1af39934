'use client';
import { useId, useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Notice } from '@/app/_ui/primitives/notice';
import { LoadingList, PlainState } from '@/app/_ui/primitives/page-state';
import type { StructureView } from '@/lib/services/files/structure-schema';
import { mappingOf, proposals, withMapping, type Mapping, type MappingRow } from './array-mapping';
import { DatasetTable } from './dataset-table';
import { useStructure } from './use-structure';

interface ArrayPartProps {
  readonly submissionId: string;
  /** Of the file as it is stored; null while it is not here. */
  readonly fileId: string | null;
  readonly waveform: string;
  readonly file: string;
  readonly rest: Readonly<Record<string, unknown>>;
  readonly onRest: (rest: Readonly<Record<string, unknown>>) => void;
}

/** The mapping screen: what a file of arrays holds, and what each of its datasets stands for. */
export function ArrayPart({ submissionId, fileId, waveform, file, rest, onRest }: ArrayPartProps) {
  const heading = useId();
  const [mapping, change] = useMapping(rest, onRest);
  return (
    <section aria-labelledby={heading} className="grid min-w-0 gap-3 rounded border border-hair-2 bg-page px-3 py-3">
      <h3 id={heading} className="text-ui font-semibold [overflow-wrap:anywhere]">What stands where in {file}, for {waveform}</h3>
      {fileId === null ? (
        <Notice kind="note"><p>The file is not here yet. Add it above; its datasets are listed then.</p></Notice>
      ) : (
        <Holdings submissionId={submissionId} fileId={fileId} file={file} mapping={mapping} change={change} />
      )}
    </section>
  );
}

/** Rows that are not settled live here alone; what the sheet says wins when it was changed elsewhere. */
function useMapping(rest: ArrayPartProps['rest'], onRest: ArrayPartProps['onRest']): readonly [Mapping, (next: Mapping) => void] {
  const [mapping, setMapping] = useState(() => mappingOf(rest));
  const said = (of: ArrayPartProps['rest']): string => JSON.stringify([of['datasets'] ?? null, of['time'] ?? null]);
  const current = said(withMapping(rest, mapping)) === said(rest) ? mapping : mappingOf(rest);
  const change = (next: Mapping): void => {
    setMapping(next);
    onRest(withMapping(rest, next));
  };
  return [current, change];
}

interface HoldingsProps {
  readonly submissionId: string;
  readonly fileId: string;
  readonly file: string;
  readonly mapping: Mapping;
  readonly change: (next: Mapping) => void;
}

function Holdings({ submissionId, fileId, file, mapping, change }: HoldingsProps) {
  const { state, retry } = useStructure(submissionId, fileId);
  if (state.kind === 'loading') return <LoadingList what={`the datasets of ${file}`} rows={3} />;
  if (state.kind === 'failed') return <Notice kind="stop" live="status" word="Not listed" actions={<Button size="low" onClick={retry}>Ask again</Button>}><p>{state.why}</p></Notice>;
  const { structure } = state;
  if (structure.trouble.length > 0) return <Notice kind="stop" live="status" word="Not read">{structure.trouble.map((sentence) => <p key={sentence}>{sentence}</p>)}</Notice>;
  if (structure.entries.length === 0) return <PlainState level={3} title="No dataset in it">The file can be read, but holds nothing. Attach the file that was meant.</PlainState>;
  return <Assign structure={structure} file={file} mapping={mapping} change={change} />;
}

/** Once the file is read: rows of what stands for what, times, and all that the file holds. */
export function Assign({ structure, file, mapping, change }: Pick<HoldingsProps, 'file' | 'mapping' | 'change'> & { readonly structure: StructureView }) {
  const proposed = proposals(structure.entries);
  const paths = structure.entries.filter(({ kind, refusal }) => kind === 'dataset' && refusal === null).map(({ path }) => path);
  const list = useId();
  const add = (row: MappingRow) => change({ ...mapping, rows: [...mapping.rows, row] });
  return (
    <>
      {proposed.length > 0 && mapping.rows.length === 0 && (
        <Notice kind="note" word="By the names" actions={proposed.slice(0, 6).map((one) => <Button key={one.words} size="low" onClick={() => change(one.mapping)}>Use {one.words}</Button>)}>
          <p>The names in the file suggest {proposed.length === 1 ? 'a mapping' : 'mappings'}. Look it over before you check.</p>
        </Notice>
      )}
      <datalist id={list}>{paths.map((path) => <option key={path} value={path} />)}</datalist>
      <Rows rows={mapping.rows} list={list} onRows={(rows) => change({ ...mapping, rows })} />
      <div><Button size="low" onClick={() => add({ stands: '', path: '' })}>Add a row</Button></div>
      <Times mapping={mapping} list={list} change={change} />
      <DatasetTable structure={structure} file={file} taken={mapping.rows.map(({ path }) => path)} onUse={(path) => add({ stands: '', path })} onTimes={(path) => change({ ...mapping, time: path, start: '', step: '' })} />
    </>
  );
}

const standsFor: readonly (readonly [string, string])[] = [['2,2', 'the mode ℓ = 2, m = 2'], ['data', 'all modes in one array'], ['modes', 'the list of (ℓ, m) of the data'], ['plus', 'h₊ along a line of sight'], ['cross', 'h× along a line of sight'], ['re22', 'real part of a mode'], ['im22', 'imaginary part of a mode'], ['amp22', 'amplitude of a mode'], ['phase22', 'phase of a mode']];

function Rows({ rows, list, onRows }: { readonly rows: readonly MappingRow[]; readonly list: string; readonly onRows: (rows: readonly MappingRow[]) => void }) {
  const options = useId();
  const put = (at: number, row: MappingRow) => onRows(rows.map((old, i) => (i === at ? row : old)));
  return (
    <ul className="grid gap-2">
      <datalist id={options}>{standsFor.map(([value, words]) => <option key={value} value={value}>{words}</option>)}</datalist>
      {rows.map((row, i) => (
        // Rows have no name of their own: their place is what tells them apart.
        <li key={i} className="grid items-end gap-2 sm:grid-cols-[110px_minmax(0,1fr)_auto]">
          <TextField label={`Row ${i + 1} stands for`} labelHidden={i > 0} list={options} placeholder="2,2 or plus" autoComplete="off" spellCheck={false} value={row.stands} onChange={(e) => put(i, { ...row, stands: e.target.value })} />
          <TextField label={`Row ${i + 1}, dataset`} labelHidden={i > 0} list={list} placeholder="/path, or a part: /path[0,:]" autoComplete="off" spellCheck={false} value={row.path} onChange={(e) => put(i, { ...row, path: e.target.value })} />
          <Button size="low" tone="quiet" aria-label={`Remove row ${i + 1}`} onClick={() => onRows(rows.filter((_, k) => k !== i))}>Remove</Button>
        </li>
      ))}
    </ul>
  );
}

function Times({ mapping, list, change }: { readonly mapping: Mapping; readonly list: string; readonly change: (next: Mapping) => void }) {
  return (
    <div className="grid gap-3 sm:grid-cols-3">
      <TextField label="Times (or frequencies) in" list={list} placeholder="in each dataset" autoComplete="off" spellCheck={false} hint="Not needed for N×3 datasets" value={mapping.time} onChange={(e) => change({ ...mapping, time: e.target.value })} />
      <TextField label="or even steps, from" inputMode="decimal" placeholder="0" disabled={mapping.time.trim() !== ''} value={mapping.start} onChange={(e) => change({ ...mapping, start: e.target.value })} />
      <TextField label="Step" inputMode="decimal" placeholder="not given" disabled={mapping.time.trim() !== ''} value={mapping.step} onChange={(e) => change({ ...mapping, step: e.target.value })} />
    </div>
  );
}
