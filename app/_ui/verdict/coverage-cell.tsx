import type { Coverage } from '@/lib/pipeline/result';
import { formatNumber } from '../math/format-number';

/** Does the stated uncertainty cover what the data allow? A statement of its own, beside the verdict. */
export function coverageText(coverage: Coverage, full = false): { readonly word: string; readonly because: string | null } {
  if (coverage.state === 'covered') return { word: 'Covered', because: null };
  const missing = coverage.missing ?? [];
  const named = full || missing.length === 1 ? `missing: ${missing.join(', ')}` : `${missing.length} components are missing`;
  const because = missing.length === 0 ? null : named;
  if (coverage.state === 'unknown') return { word: 'Unknown', because };
  const times = coverage.factor === undefined ? '' : ` × ${formatNumber(coverage.factor, { significant: 2 })}${because === null ? '' : ' or more'}`;
  return { word: `Understated${times}`, because };
}

/** In the table's cell the missing parts are counted; `full` names them all. */
export function CoverageStatement({ coverage, full }: { readonly coverage: Coverage | null; readonly full?: boolean }) {
  if (!coverage) return <span className="text-ink-2">not yet</span>;
  const { word, because } = coverageText(coverage, full);
  return (
    <>
      <b>{word}</b>
      {because && <>{' '}<span className="remark">{because}</span></>}
    </>
  );
}

export const CoverageCell = ({ coverage, rowSpan }: { readonly coverage: Coverage | null; readonly rowSpan?: number }) => (
  <td className="r cov" role="cell" data-l="Coverage" rowSpan={rowSpan}><CoverageStatement coverage={coverage} /></td>
);
