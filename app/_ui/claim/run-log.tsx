import { Hash } from '../primitives/facts';
import { Part } from './opened-claim';
import type { RecordView } from './record-view';

/** What the run did, and the digest of what came out. */
export function RunLog({ view, claimId }: { readonly view: RecordView; readonly claimId: string }) {
  const log = view.logs[claimId] ?? view.logs[''] ?? null;
  const sha = view.run.state === 'done' ? view.run.resultSha256 : null;
  if (!log && !sha && !view.engine) return null;
  return (
    <Part title="Run log">
      {log && <pre tabIndex={0} role="group" aria-label={`Run log of ${claimId}`} className="overflow-x-auto whitespace-pre font-mono text-small text-ink-2">{log}</pre>}
      {view.engine && <p className="text-ui text-ink-2">Engine {view.engine}{view.run.state === 'done' && view.run.finishedOn ? `, ${view.run.finishedOn}` : ''}</p>}
      {sha && <p><Hash value={sha} name="result sha256" /></p>}
    </Part>
  );
}
