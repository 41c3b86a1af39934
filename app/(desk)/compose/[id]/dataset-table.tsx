'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Table } from '@/app/_ui/primitives/table';
import type { StructureEntry } from '@/lib/formats/arrays/structure';
import type { StructureView } from '@/lib/services/files/structure-schema';

interface DatasetTableProps {
  readonly structure: StructureView;
  readonly file: string;
  readonly taken: readonly string[];
  readonly onUse: (path: string) => void;
  readonly onTimes: (path: string) => void;
}

const shownAtOnce = 100;
const shapeOf = ({ shape }: StructureEntry): string => (shape === null ? '' : shape.length === 0 ? 'one number' : shape.map((n) => n.toLocaleString('en-GB')).join(' × '));

/** Every dataset of the file with its shape, type and attributes; what cannot be used says why. */
export function DatasetTable({ structure, file, taken, onUse, onTimes }: DatasetTableProps) {
  const [filter, setFilter] = useState('');
  // As it was at first: it must not close under the hand that maps the first row.
  const [open] = useState(taken.length === 0);
  const fitting = structure.entries.filter(({ path }) => path.toLowerCase().includes(filter.trim().toLowerCase()));
  const shown = fitting.slice(0, shownAtOnce);
  return (
    <Disclosure summary={`What is in ${file}: ${structure.entries.filter(({ kind }) => kind === 'dataset').length} datasets`} open={open}>
      <div className="grid gap-2">
        {structure.entries.length > 12 && <div className="max-w-[320px]"><TextField label="Show paths with" value={filter} onChange={(e) => setFilter(e.target.value)} /></div>}
        <p role="status" className="text-small text-ink-2">{fitting.length === 0 ? 'No path has this in it.' : shown.length < fitting.length ? `The first ${shown.length} of ${fitting.length}; narrow the paths to see others.` : `${fitting.length} shown.`}{structure.cut ? ' More is in the file than is listed.' : ''}</p>
        {shown.length > 0 && (
          <Table caption={`Datasets of ${file}`}>
            <thead><tr>{['Path', 'Shape', 'Stored', 'Attributes', 'Use'].map((head) => <th key={head} scope="col">{head}</th>)}</tr></thead>
            <tbody>{shown.map((entry) => <Entry key={entry.path} entry={entry} used={taken.some((path) => path === entry.path || path.startsWith(`${entry.path}[`))} onUse={onUse} onTimes={onTimes} />)}</tbody>
          </Table>
        )}
      </div>
    </Disclosure>
  );
}

function Entry({ entry, used, onUse, onTimes }: { readonly entry: StructureEntry; readonly used: boolean } & Pick<DatasetTableProps, 'onUse' | 'onTimes'>) {
  const { path, kind, type, attributes, refusal, shape, complex } = entry;
  return (
    <tr className="align-top">
      <th scope="row" className="font-normal [overflow-wrap:anywhere]">{path}</th>
      <td className="whitespace-nowrap">{kind === 'group' ? 'group' : shapeOf(entry)}</td>
      <td>{refusal === null ? type : <span className="edge edge-look block pl-2 text-small">{refusal}</span>}</td>
      <td className="text-small">{attributes.map(({ name, value }) => <span key={name} className="block [overflow-wrap:anywhere]">{name}: {value}</span>)}</td>
      <td>
        {kind === 'dataset' && refusal === null && (
          <span className="flex flex-wrap gap-1">
            <Button size="low" onClick={() => onUse(path)} aria-label={`Use ${path}`}>{used ? 'Use again' : 'Use'}</Button>
            {!complex && shape?.length === 1 && <Button size="low" tone="quiet" onClick={() => onTimes(path)} aria-label={`Take ${path} as times`}>As times</Button>}
          </span>
        )}
      </td>
    </tr>
  );
}
