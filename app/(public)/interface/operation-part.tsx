import { Table } from '@/app/_ui/primitives/table';
import type { FieldLine, OperationLine } from './describe-operation';

export function OperationPart({ operation }: { readonly operation: OperationLine }) {
  const { id, door, summary, scope, status, query, body, upload, answer, answerWord } = operation;
  return (
    <article aria-labelledby={id} className="grid grid-cols-[minmax(0,1fr)] gap-3 py-5 shadow-[inset_0_1px_var(--hair-2)]">
      <h3 id={id} className="scroll-mt-4 font-code text-code font-semibold [overflow-wrap:anywhere]">{door}</h3>
      <p className="max-w-measure text-ui">{summary} <span className="text-ink-2">Scope: {scope}.</span></p>
      {query.length > 0 && <Fields caption={`Parameters of ${door}`} title="Parameters" fields={query} />}
      {upload === 'bytes' && <p className="max-w-measure text-ui">Takes <code className="font-code text-code">application/octet-stream</code>: the bytes as they are.</p>}
      {upload === 'folder' && <p className="max-w-measure text-ui">Takes <code className="font-code text-code">multipart/form-data</code>: {door.endsWith('/files') ? '' : <><code className="font-code text-code">claim</code> is the claim sheet, </>}each <code className="font-code text-code">file</code> a file under its relative path{door.endsWith('/files') ? '' : ', or one of them a .zip of all'}.</p>}
      {body.length > 0 && <Fields caption={`Body of ${door}`} title="Body, application/json" fields={body} />}
      {answer.length > 0 ? <Fields caption={`Answer of ${door}`} title={`Answer, ${status}`} fields={answer} /> : <p className="text-ui"><span className="font-semibold">Answer, {status}:</span> {answerWord}</p>}
    </article>
  );
}

const Fields = ({ caption, title, fields }: { readonly caption: string; readonly title: string; readonly fields: readonly FieldLine[] }) => (
  <div>
    <p className="mb-1 text-small font-semibold text-ink-2">{title}</p>
    <Table caption={caption} className="min-w-[520px]">
      <thead><tr><th scope="col" className="w-[180px]">Field</th><th scope="col">Type</th><th scope="col">Note</th></tr></thead>
      <tbody>
        {fields.map(({ name, type, needed, note }) => (
          <tr key={name}><th scope="row" className="font-code text-code">{name}</th><td className="[overflow-wrap:anywhere]">{type}</td><td>{[needed ? '' : 'May be absent.', note].filter(Boolean).join(' ')}</td></tr>
        ))}
      </tbody>
    </Table>
  </div>
);
