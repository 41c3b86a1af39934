import type { ResultClaim } from '@/lib/pipeline/result';
import { formatNumber } from '../math/format-number';
import { roundUpUncertainty } from '../math/format-uncertainty';
import { NumberCell, Unknown } from '../math/number-cell';
import { Table } from '../primitives/table';
import { CoverageStatement } from '../verdict/coverage-cell';
import { budgetGroup, type BudgetGroup } from './budget-shares';

const shareText = (share: number) => `${(100 * share).toFixed(1)} %`;

function Share({ share, hatched }: { readonly share: number; readonly hatched: boolean }) {
  const fill = hatched ? 'repeating-linear-gradient(90deg, var(--ink-2) 0 3px, transparent 3px 5px)' : 'var(--trace-recomputed)';
  return (
    <>
      <span aria-hidden className="relative mt-1.5 block h-2 w-full min-w-10 bg-hover"><span className="absolute inset-y-0 left-0" style={{ width: `${100 * share}%`, background: fill }} /></span>
      <span className="sr-only">{shareText(share)}</span>
    </>
  );
}

function Lines({ group, unit }: { readonly group: BudgetGroup; readonly unit: string }) {
  return group.lines.map((line) => (
    <tr key={line.id + line.component}>
      <th scope="row" className="font-normal!">{line.component}</th>
      <td className="num">{line.u === null ? '—' : <NumberCell value={line.u} significant={2} unit={unit} />}</td>
      {line.share === null ? (
        <td colSpan={2}><Unknown>not available, not zero</Unknown> {line.note.replace(/^not available: /i, '')}</td>
      ) : (
        <>
          <td className="w-1/4 max-sm:hidden!"><Share share={line.share} hatched={group.group === 'coverage'} /></td>
          <td>{line.note}</td>
        </>
      )}
    </tr>
  ));
}

const GroupHead = ({ children }: { readonly children: React.ReactNode }) => (
  <tr><th scope="rowgroup" colSpan={4} className="pt-3.5! text-small text-ink-2">{children}</th></tr>
);

function Sum({ group, unit, label, children }: { readonly group: BudgetGroup; readonly unit: string; readonly label: React.ReactNode; readonly children?: React.ReactNode }) {
  return (
    <tr>
      <th scope="row">{label}</th>
      <td className="num"><b>{group.expanded === null ? '—' : <NumberCell value={roundUpUncertainty(group.expanded)} significant={2} unit={unit} />}</b></td>
      <td colSpan={2}>{children}</td>
    </tr>
  );
}

/** Together with the computation's lines; results of earlier versions only have the group's own sum. */
function DataSum({ claim, group }: { readonly claim: ResultClaim; readonly group: BudgetGroup }) {
  const total = claim.uncertainty?.data;
  const coverage = <>Coverage: <CoverageStatement coverage={claim.coverage} full /></>;
  if (!total) return <Sum group={group} unit={claim.unit} label={<>Known part, <i>k</i> = 2</>}>{coverage}</Sum>;
  const { interval, degreesOfFreedom } = total;
  return (
    <Sum group={{ ...group, expanded: total.expanded }} unit={claim.unit} label={<>{total.missing.length > 0 ? 'All known lines' : 'All lines'}, <i>k</i> = {(total.coverageFactor === 2 ? '2' : formatNumber(total.coverageFactor, { significant: 3 }))}</>}>
      {coverage}
      {degreesOfFreedom !== null && <> {formatNumber(degreesOfFreedom, { significant: 2 })} effective degrees of freedom.</>}
      {interval && <> By draws, 95 %: <NumberCell value={interval.low} significant={4} unit={claim.unit} /> to <NumberCell value={interval.high} significant={4} unit={claim.unit} />.</>}
    </Sum>
  );
}

/** Two groups, each with its own shares: what makes U, and what only decides coverage. */
export function BudgetTable({ claim }: { readonly claim: ResultClaim }) {
  const computation = budgetGroup(claim.budget, 'computation');
  const coverage = budgetGroup(claim.budget, 'coverage');
  return (
    <Table caption={`Components of the uncertainty of ${claim.id} at its worst point, in two groups`}>
      <thead><tr><th scope="col">Component</th><th scope="col" className="num">Size, <i>k</i> = 1</th><th scope="col" className="max-sm:hidden">Share</th><th scope="col">How estimated</th></tr></thead>
      <tbody>
        <GroupHead>Of the computation: this makes <i>U</i></GroupHead>
        <Lines group={computation} unit={claim.unit} />
        <Sum group={computation} unit={claim.unit} label={<><i>U</i>, <i>k</i> = 2</>}>{computation.missing.length > 0 && <>at least: {computation.missing.join(', ')} unknown</>}</Sum>
      </tbody>
      {coverage.lines.length > 0 && (
        <tbody>
          <GroupHead>Chosen or not known from the files: decides coverage, not <i>U</i></GroupHead>
          <Lines group={coverage} unit={claim.unit} />
          <DataSum claim={claim} group={coverage} />
        </tbody>
      )}
    </Table>
  );
}
