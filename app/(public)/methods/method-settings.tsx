import { settingLabel } from '@/app/_ui/claim/setting-names';
import { Prose } from '@/app/_ui/math/render-markdown';
import { Table } from '@/app/_ui/primitives/table';
import type { Quantity } from '@/lib/engine/contract/quantity';
import { settingRows } from '@/lib/engine/quantities/settings-table';
import { shapeWords } from './setting-shape-words';

/** Drawn from the table by which a sheet is checked and a claim computed; only the last column is written by hand. */
export function MethodSettings({ quantity, notes }: { readonly quantity: Quantity; readonly notes: ReadonlyMap<string, string> }) {
  const rows = settingRows(quantity);
  return (
    <>
      <Table caption={`Settings of ${quantity.title.toLowerCase()}, with type, range and house default`} className="mt-3 min-w-[44rem]">
        <thead><tr><th scope="col">Setting</th><th scope="col">Type and range</th><th scope="col">When undeclared</th><th scope="col">What it is, and what it changes here</th></tr></thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.name} id={`setting-${row.name}`}>
              <th scope="row" className="w-40">{settingLabel(row.name)}<code className="block font-code text-code font-normal text-ink-2">{row.name}</code></th>
              <td className="w-44">{shapeWords(row)}{quantity.sweepable.includes(row.name) && <span className="block text-ink-2">may be swept</span>}</td>
              <td className="w-44">{row.houseDefault}</td>
              <td>{row.meaning}{notes.has(row.name) && <div className="mt-1 text-ink-2 [&_.prose]:font-sans [&_.prose]:text-[14px]/[20px]"><Prose source={notes.get(row.name) ?? ''} /></div>}</td>
            </tr>
          ))}
        </tbody>
      </Table>
      <p className="mt-3 max-w-measure text-ui text-ink-2">A default that could change the number is listed as <i>assumed</i> beside it. These rows are read from the engine: a sheet is checked, and a claim computed, by the same ones.</p>
    </>
  );
}
