import Link from 'next/link';
import { ClaimRows } from './claim-rows';
import type { RecordSlots, RecordView } from './record-view';

interface ClaimTableProps {
  readonly view: RecordView;
  readonly slots?: RecordSlots;
  /** Ids of the claims that stand open at first. */
  readonly open?: readonly string[];
  /** Rows only, with nothing to open: the landing page, summaries. */
  readonly closed?: boolean;
}

export const PerfCell = ({ rowSpan }: { readonly rowSpan?: number }) => <td className="perf perf-turn" aria-hidden="true" rowSpan={rowSpan} />;

/** Claimed and recomputed as one table, so that a screen reader hears both halves of a row together. */
export function ClaimTable({ view, slots = {}, open = [], closed }: ClaimTableProps) {
  const busy = view.run.state === 'running' || view.run.state === 'waiting';
  return (
    <div className="ctable-frame">
      <table className="ctable" role="table" aria-busy={busy || undefined}>
        <caption className="sr-only">
          Each row sets a claimed number beside the recomputed one. Apart by is recomputed minus claimed; the verdict weighs it with U against the tolerance T.
        </caption>
        <colgroup>
          <col className="k1" /><col className="k2" /><col className="k3" /><col className="k4" /><col className="kp" />
          <col className="k5" /><col className="k6" /><col className="k7" /><col className="k8" /><col />
        </colgroup>
        <ClaimTableHead />
        {view.claims.map((heading) => <ClaimRows key={heading.id} heading={heading} view={view} slots={slots} initiallyOpen={open} closed={closed} />)}
      </table>
    </div>
  );
}

function ClaimTableHead() {
  return (
    <thead role="rowgroup">
      <tr className="side" role="row">
        <th className="c" role="columnheader" scope="colgroup" colSpan={4}>Claimed <small>by the authors</small></th>
        <PerfCell />
        <th className="r" role="columnheader" scope="colgroup" colSpan={5}>Recomputed <small>from their files, by two routes</small></th>
      </tr>
      <tr role="row">
        <th className="c" role="columnheader" scope="col">Claim</th>
        <th className="c at" role="columnheader" scope="col">At</th>
        <th className="c nh" role="columnheader" scope="col">Value</th>
        <th className="c nh" role="columnheader" scope="col"><abbr title="declared or natural tolerance plus half a unit of the last printed digit">Tolerance</abbr></th>
        <PerfCell />
        <th className="r nh" role="columnheader" scope="col">Value</th>
        <th className="r nh" role="columnheader" scope="col"><abbr title="expanded uncertainty of the computation alone, k = 2"><i>U</i></abbr></th>
        <th className="r nh" role="columnheader" scope="col">Apart by</th>
        <th className="r" role="columnheader" scope="col">Verdict</th>
        <th className="r" role="columnheader" scope="col"><abbr title="does the stated uncertainty cover what the data allow?">Coverage</abbr></th>
      </tr>
    </thead>
  );
}

/** The rule of the table in a sentence, to stand below it. */
export const ClaimTableLegend = () => (
  <p className="mt-2 text-small text-ink-2">
    Apart by = recomputed − claimed. A claim agrees when |apart| + <i>U</i> ≤ <i>T</i>, differs when |apart| − <i>U</i> &gt; <i>T</i>, and is unsettled between. <i>U</i> is that of
    the computation alone; what was chosen, or is not known from the files, decides coverage. Values are printed to the digits the tolerance needs; the result file has them all.{' '}
    <Link href="/methods">The rule in full</Link>
  </p>
);
