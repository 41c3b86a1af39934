import { Perforation } from '../primitives/perforation';
import { ProgressList } from '../primitives/progress';
import { remarkWord, VerdictStrip } from '../verdict/verdict-chip';
import { countVerdicts, overallWord } from '../verdict/verdict-words';
import { verdictsOf, type DecisionView, type RecordView } from './record-view';

const label = 'font-sans text-small font-semibold text-ink-2';
const big = 'mt-1 mb-1.5 font-serif text-[20px]/[28px] font-semibold';

/** What the machine reads: never an opinion, never a decision. */
function Reading({ view }: { readonly view: RecordView }) {
  const verdicts = verdictsOf(view);
  const { run } = view;
  if (run.state === 'none') return <p className={big}>No run yet</p>;
  if (run.state === 'stopped') return <><p className={big}>The run stopped</p><p className="max-w-[62ch] text-ui">{run.reason}</p></>;
  if (run.state === 'waiting') return <><p className={big}>Waiting for its turn</p><p className="text-ui text-ink-2">{run.ahead ? `${run.ahead} ahead.` : 'It starts as soon as a worker is free.'} You may leave this page.</p></>;
  if (run.state === 'running') return <><p className={big}>A run is under way</p><ProgressList steps={run.steps} /><p className="mt-1 text-ui text-ink-2">You may leave this page; the numbers come in when it ends.</p></>;
  return (
    <>
      <p className={big}>{overallWord(verdicts.map((v) => v.verdict))}</p>
      <p className="mb-1.5"><VerdictStrip verdicts={verdicts} /></p>
      <p className="max-w-[62ch] text-ui text-ink-2">
        Of {verdicts.length} {verdicts.length === 1 ? 'claim' : 'claims'} {countVerdicts(verdicts.map((v) => v.verdict))} at the tolerance declared.
        {view.engine && <> Engine {view.engine}{run.finishedOn && `, run ${run.finishedOn}`}.</>}
      </p>
      {view.laterRun && <p className="mt-1.5 max-w-[62ch] text-ui text-ink-2">{view.laterRun}</p>}
    </>
  );
}

function Decision({ decision }: { readonly decision: DecisionView }) {
  return (
    <>
      <p className={big}>{decision.title}{decision.coveredClaims.length > 0 && <> <span className="whitespace-nowrap">for {decision.coveredClaims.join(', ')}</span></>}</p>
      {decision.remarks.length > 0 && <p className="mb-2 text-ui text-ink-2">{decision.remarks.length === 1 ? 'Remark' : 'Remarks'}: <i>{decision.remarks.map(remarkWord).join(', ')}</i>.</p>}
      {decision.note && <p className="mb-2 max-w-[62ch] text-ui text-ink-2">“{decision.note}”</p>}
      <p className="text-ui text-ink-2">{decision.by}, {decision.on}</p>
    </>
  );
}

/** Machine reading and editor's decision: two boxes with the holes between, never one thing. */
export function ReadingAndDecision({ view }: { readonly view: RecordView }) {
  return (
    <div className="halves">
      <div>
        <h2 className={label}>What the machine reads</h2>
        <Reading view={view} />
      </div>
      <Perforation />
      <div>
        <h2 className={label}>What the editor decided</h2>
        {view.decision ? <Decision decision={view.decision} /> : <><p className={big}>Nothing yet</p><p className="max-w-[62ch] text-ui text-ink-2">{view.mode === 'draft' ? 'A draft is seen by its authors alone. Referees and an editor read it once it is lodged.' : 'Referees and an editor read the numbers; only the editor enters a record.'}</p></>}
      </div>
    </div>
  );
}
