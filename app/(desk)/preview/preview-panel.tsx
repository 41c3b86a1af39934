'use client';
import { FindingItem } from '@/app/_ui/claim/finding-item';
import { formatAt } from '@/app/_ui/claim/setting-names';
import { printedDecimals } from '@/app/_ui/math/format-uncertainty';
import { NumberCell, PrintedNumber, Unknown } from '@/app/_ui/math/number-cell';
import { readable } from '@/app/_ui/math/format-number';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import { ProgressList } from '@/app/_ui/primitives/progress';
import { Table } from '@/app/_ui/primitives/table';
import { Tag } from '@/app/_ui/primitives/tag';
import { formatProblem } from '@/lib/kernel/problem';
import type { Preview, PreviewClaim, PreviewPoint } from '@/lib/pipeline/preview';
import type { PreviewState } from './use-preview';

/** What a look is under way with, what it saw, or what stood in its way. */
export function PreviewPanel({ state, onCancel }: { readonly state: PreviewState; readonly onCancel: () => void }) {
  switch (state.kind) {
    case 'idle': return null;
    case 'running': return (
      <div className="grid gap-2 rounded border border-hair-2 bg-sheet px-4 py-3">
        <ProgressList label="The look" steps={[{ label: state.doing, fraction: state.fraction }]} />
        <div><Button size="low" onClick={onCancel}>Stop looking</Button></div>
      </div>
    );
    case 'stopped': return <Notice kind="look" live="status" word="Stopped"><p>{state.why}</p></Notice>;
    case 'refused': return (
      <Notice kind="stop" live="alert" word="To mend">
        <p>Nothing could be computed. Nothing was sent.</p>
        <ul className="mt-1 grid gap-1">{state.problems.map((problem, i) => <li key={i} className="[overflow-wrap:anywhere]">{formatProblem(problem)}</li>)}</ul>
      </Notice>
    );
    case 'done': return <Seen preview={state.preview} tookMs={state.tookMs} />;
  }
}

function Seen({ preview, tookMs }: { readonly preview: Preview; readonly tookMs: number }) {
  return (
    <section aria-label="Preview" className="grid gap-2 rounded border border-dashed border-control bg-sheet px-4 py-3">
      <p role="status" className="flex flex-wrap items-baseline gap-x-2 gap-y-1 text-ui">
        <Tag>preview</Tag>
        <span>Route A only, in this browser, in {readable(tookMs / 1000, 2)} s; nothing was sent. The server’s run by two routes is what counts.</span>
      </p>
      <Table caption="Preview of each claimed number">
        <thead><tr><th scope="col">Claim</th><th scope="col">Point</th><th scope="col" className="num">Claimed</th><th scope="col" className="num">Preview</th><th scope="col">Uncertainty</th></tr></thead>
        <tbody>{preview.claims.flatMap((claim) => claim.points.map((point, i) => <Row key={`${claim.id} ${i}`} claim={claim} point={point} first={i === 0} />))}</tbody>
      </Table>
      {preview.claims.map(({ id, findings }) => findings.length > 0 && (
        <div key={id} role="group" aria-label={`Findings of ${id}`}>{findings.map((finding, i) => <FindingItem key={i} finding={finding} />)}</div>
      ))}
    </section>
  );
}

function Row({ claim, point, first }: { readonly claim: PreviewClaim; readonly point: PreviewPoint; readonly first: boolean }) {
  // Two digits more than were printed: enough to see where the two part, no more than one route is good for.
  const style = printedDecimals(point.printed) > 0 ? { decimals: printedDecimals(point.printed) + 2 } : { significant: 6 };
  return (
    <tr>
      <th scope="row">{claim.id}{first && <span className="block text-small font-normal text-ink-2">{claim.title}</span>}</th>
      <td>{formatAt(point.at) || 'one number'}</td>
      <td className="num"><PrintedNumber printed={point.printed} unit={claim.unit} /></td>
      <td className="num"><data value={point.value === null ? '' : String(point.value)}><NumberCell value={point.value} unit={claim.unit} unknown="not computable" {...style} /></data></td>
      <td><Unknown>not assessed in a preview</Unknown></td>
    </tr>
  );
}
