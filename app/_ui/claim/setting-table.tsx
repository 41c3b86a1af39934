import type { UsedSetting } from '@/lib/engine/contract/measurement';
import { formatSetting, settingLabel } from './setting-names';

/** How a setting came to be. `confirmed` is an assumed one that the authors have since agreed to. */
export type Standing = UsedSetting['standing'] | 'confirmed';

export const SettingStanding = ({ standing }: { readonly standing: Standing }) => <span className={`standing standing-${standing}`}>{standing}</span>;

export function SettingTable({ claimId, settings }: { readonly claimId: string; readonly settings: readonly UsedSetting[] }) {
  if (settings.length === 0) return <p className="text-ui text-ink-2">The run stopped before any setting was used.</p>;
  return (
    <table className="w-full text-ui">
      <caption className="sr-only">Settings of {claimId}, with the value used and how it came to be</caption>
      <thead>
        <tr className="text-left text-small text-ink-2">
          <th scope="col" className="pb-1.5 pr-2 font-semibold">Setting</th>
          <th scope="col" className="pb-1.5 pr-2 font-semibold">Value</th>
          <th scope="col" className="pb-1.5 font-semibold">Standing</th>
        </tr>
      </thead>
      <tbody>
        {settings.map((setting) => (
          <tr key={setting.name} className="align-top shadow-[inset_0_1px_var(--hair-2)]">
            <th scope="row" className="py-1.5 pr-2 text-left font-normal">{settingLabel(setting.name)}</th>
            <td className="py-1.5 pr-2 [overflow-wrap:anywhere]">{setting.standing === 'swept' ? 'as each row says' : formatSetting(setting.name, setting.value, setting.unit)}</td>
            <td className="py-1.5"><SettingStanding standing={setting.standing} /></td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
