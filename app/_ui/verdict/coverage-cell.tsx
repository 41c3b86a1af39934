import type { Coverage } from '@/lib/pipeline/result';
import { formatNumber } from '../math/format-number';

/** Does the stated uncertainty cover what the data allow? A statement of its own, beside the verdict. */
export function coverageText(coverage: Coverage, full = false): { readonly word: string; readonly because: string | null } {
  if (coverage.state === 'covered') return { word: 'Covered', because: null };
  if (coverage.state === 'understated') {
    const times = coverage.factor === undefined ? '' : ` × ${formatNumber(coverage.factor, { significant: 2 })}`;
    return { word: `Understated${times}`, because: null };
  }
  const missing = coverage.missing ?? [];
  const because = full || missing.length === 1 ? `missing: ${missing.join(', ')}` : `${missing.length} components are missing`;
  return { word: 'Unknown', because: missing.length === 0 ? null : because };
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
