import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { ConventionNote, SettingReadings } from './convention-words';
import { formatSetting, settingLabel } from './setting-names';
import { ConventionLinks, SettingReadingsList } from './setting-readings';

/** How a setting came to be. `confirmed` is an assumed one that the authors have since agreed to. */
export type Standing = UsedSetting['standing'] | 'confirmed';

export const SettingStanding = ({ standing }: { readonly standing: Standing }) => <span className={`standing standing-${standing}`}>{standing}</span>;

interface SettingTableProps {
  readonly claimId: string;
  readonly settings: readonly UsedSetting[];
  /** What else can be meant by each of them, and by what none of them says. */
  readonly readings?: readonly SettingReadings[];
  readonly unsaid?: readonly Pick<ConventionNote, 'id' | 'title'>[];
}

export function SettingTable({ claimId, settings, readings = [], unsaid = [] }: SettingTableProps) {
  if (settings.length === 0) return <p className="text-ui text-ink-2">The run stopped before any setting was used.</p>;
  const of = new Map(readings.map((one) => [one.setting, one]));
  return (
    <>
      <table className="w-full text-ui">
        <caption className="sr-only">Settings of {claimId}, with the value used and how it came to be</caption>
        <thead>
          <tr className="text-left text-small text-ink-2">
            <th scope="col" className="pb-1.5 pr-2 font-semibold">Setting</th>
            <th scope="col" className="pb-1.5 pr-2 font-semibold">Value</th>
            <th scope="col" className="pb-1.5 pr-2 font-semibold">Standing</th>
            {readings.length > 0 && <th scope="col" className="pb-1.5 font-semibold">Convention</th>}
          </tr>
        </thead>
        <tbody>
          {settings.map((setting) => (
            <tr key={setting.name} className="align-top shadow-[inset_0_1px_var(--hair-2)]">
              <th scope="row" className="py-1.5 pr-2 text-left font-normal">{settingLabel(setting.name)}</th>
              <td className="py-1.5 pr-2 [overflow-wrap:anywhere]">{setting.standing === 'swept' ? 'as each row says' : formatSetting(setting.name, setting.value, setting.unit)}</td>
              <td className="py-1.5 pr-2"><SettingStanding standing={setting.standing} /></td>
              {readings.length > 0 && <td><ConventionLinks {...(of.get(setting.name) ?? { setting: setting.name, notes: [] })} /></td>}
            </tr>
          ))}
        </tbody>
      </table>
      <SettingReadingsList summary="What else can be meant by these" readings={readings} unsaid={unsaid} className="mt-1" />
    </>
  );
}
