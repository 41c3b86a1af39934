import type { ResultClaim, ResultSensitivity } from '@/lib/pipeline/result';
import { formatNumber } from '../math/format-number';
import { NumberCell, Unknown } from '../math/number-cell';
import { Table } from '../primitives/table';
import { SettingStanding } from './setting-table';
import { formatSetting, settingLabel } from './setting-names';

/** From here on a setting decides the claim by itself. */
const AS_MUCH = 1;

/** What the computation itself leaves open: a smaller change is none that it could tell. */
const resolvedBy = ({ uncertainty }: ResultClaim): number => uncertainty?.computation.expanded ?? 0;

function Moved({ row, claim }: { readonly row: ResultSensitivity; readonly claim: ResultClaim }) {
  const { unit } = claim;
  if (row.change === null) return <td colSpan={2}><Unknown>no number</Unknown> {row.because}</td>;
  if (Math.abs(row.change) <= resolvedBy(claim)) return <td colSpan={2} className="text-right! text-ink-2">by less than <i>U</i></td>;
  const size = row.inTolerances;
  return (
    <>
      <td className="num"><NumberCell value={row.change} significant={2} signed unit={unit} /></td>
      <td className="num">
        {size === null ? <Unknown>no tolerance</Unknown> : Math.abs(size) >= AS_MUCH ? <b>{formatNumber(size, { significant: 2, signed: true })} <i>T</i></b> : <>{formatNumber(size, { significant: 2, signed: true })} <i>T</i></>}
      </td>
    </>
  );
}

/** Which settings alone would carry the number out of its tolerance. */
function summary(rows: readonly ResultSensitivity[]): string {
  const heavy = [...new Set(rows.filter((row) => row.inTolerances !== null && Math.abs(row.inTolerances) >= AS_MUCH).map((row) => settingLabel(row.setting)))];
  if (heavy.length === 0) return 'None of these steps moves the number by as much as its tolerance T.';
  return `By a tolerance T or more: ${heavy.join(', ')}.`;
}

/** Four digits say where a setting was put; the table of settings has them all. */
const brief = (value: unknown): unknown => (typeof value === 'number' && !Number.isInteger(value) ? Number(value.toPrecision(4)) : value);

/** Each setting put elsewhere alone, by route A at the worst point: what the number would be. */
export function SensitivityTable({ claim }: { readonly claim: ResultClaim }) {
  const rows = claim.sensitivities ?? [];
  return (
    <>
      <p className="mb-2 text-ui">{summary(rows)}</p>
      <Table caption={`Sensitivities of ${claim.id}: how far each setting alone moves the number at its worst point, in its unit and in tolerances`}>
        <thead><tr><th scope="col">Setting</th><th scope="col">Used</th><th scope="col">Tried</th><th scope="col" className="num">Moves by</th><th scope="col" className="num">In tolerances</th></tr></thead>
        <tbody>
          {rows.map((row, i) => (
            <tr key={i}>
              <th scope="row" className="font-normal!">{settingLabel(row.setting)}<span className="block text-small"><SettingStanding standing={row.standing} /></span></th>
              <td>{formatSetting(row.setting, brief(row.used), row.unit)}</td>
              <td>{formatSetting(row.setting, brief(row.tried), row.unit)}</td>
              <Moved row={row} claim={claim} />
            </tr>
          ))}
        </tbody>
      </Table>
    </>
  );
}
