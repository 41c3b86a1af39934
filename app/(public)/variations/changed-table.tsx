import type { Route } from 'next';
import Link from 'next/link';
import { SettingStanding } from '@/app/_ui/claim/setting-table';
import { formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import { Table } from '@/app/_ui/primitives/table';
import { conventionHref } from '@/app/_ui/claim/convention-words';
import type { ConventionId } from '@/lib/explain/conventions/convention';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { VariationChanges } from '@/lib/services/variations/variation-view';
import { maskInWords, noiseInWords } from './variation-words';

interface ChangedTableProps {
  readonly claimId: string;
  readonly changes: VariationChanges;
  readonly official: readonly UsedSetting[];
  /** Null until the run has ended. */
  readonly varied: readonly UsedSetting[] | null;
}

const named = (settings: readonly UsedSetting[] | null, name: string): UsedSetting | undefined => settings?.find((s) => s.name === name);

function Used({ setting, none }: { readonly setting: UsedSetting | undefined; readonly none: string }) {
  if (!setting) return <span className="text-ink-2">{none}</span>;
  return <>{setting.standing === 'swept' ? 'as each place says' : formatSetting(setting.name, setting.value, setting.unit)} <SettingStanding standing={setting.standing} /></>;
}

const conventionOf = (readingId: string): ConventionId => readingId.split(':')[0] as ConventionId;

function ReadingRow({ id, clause }: NonNullable<VariationChanges['readings']>[number]) {
  return (
    <tr>
      <th scope="row" className="font-normal!">Reading of <Link href={conventionHref(conventionOf(id)) as Route} className="inline-flex min-h-8 items-center">{conventionOf(id)}</Link></th>
      <td>as declared</td>
      <td><strong>as if {clause}</strong></td>
    </tr>
  );
}

/** Each changed setting as it stands in the claim and as it was varied. */
export function ChangedTable({ claimId, changes, official, varied }: ChangedTableProps) {
  return (
    <Table caption={`What was changed of ${claimId}`}>
      <thead><tr><th scope="col">Setting</th><th scope="col">In the claim</th><th scope="col">Varied</th></tr></thead>
      <tbody>
        {Object.entries(changes.settings ?? {}).map(([name, value]) => (
          <tr key={name}>
            <th scope="row" className="font-normal!">{settingLabel(name)}</th>
            <td><Used setting={named(official, name)} none="not declared" /></td>
            <td>{value === null ? <Used setting={named(varied, name)} none="not declared" /> : <strong>{formatSetting(name, value, named(varied, name)?.unit)}</strong>}</td>
          </tr>
        ))}
        {changes.noise && <tr><th scope="row" className="font-normal!">{settingLabel('noise')}</th><td><Used setting={named(official, 'noise')} none="the claim’s own" /></td><td><strong>{noiseInWords(changes.noise)}</strong></td></tr>}
        {changes.readings?.map((reading) => <ReadingRow key={reading.id} {...reading} />)}
        {changes.mask && <tr><th scope="row" className="font-normal!">Stretch of time</th><td>all of each record</td><td><strong>{maskInWords(changes.mask)}</strong>, set to zero with edges of a tenth of it</td></tr>}
      </tbody>
    </Table>
  );
}
