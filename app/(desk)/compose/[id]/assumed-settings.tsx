'use client';
import { formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import { ConventionSentence } from '@/app/_ui/claim/setting-readings';
import { Button } from '@/app/_ui/primitives/button';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import type { AssumedSetting } from './check-summary';
import { settingFrom } from './claim-fields';
import type { ComposerFields } from './fields';
import type { Fix } from './fixes';

interface AssumedProps {
  readonly assumed: readonly AssumedSetting[];
  readonly fields: () => ComposerFields;
  readonly onFix: (fix: Fix) => void;
}

/** House defaults the check took, with the value it used; each can be made the author's own word. */
export function AssumedSettings({ assumed, fields, onFix }: AssumedProps) {
  if (assumed.length === 0) return null;
  const claims = fields().claims;
  const open = assumed.filter((a) => claims.some((c) => c.id === a.claim && (c.settings[a.name] ?? '') === ''));
  if (open.length === 0) return null;
  return (
    <Disclosure summary={`Assumed: ${open.length} ${open.length === 1 ? 'setting' : 'settings'}`} className="border-t border-hair px-4 py-2">
      <ul className="grid gap-2 text-ui">
        {open.map((a) => {
          const index = claims.findIndex((c) => c.id === a.claim);
          return (
            <li key={`${a.claim} ${a.name}`} className="flex flex-wrap items-center gap-x-3 gap-y-1">
              <span>{a.claim}: {settingLabel(a.name)} {formatSetting(a.name, settingFrom(a.name, a.value), a.unit)}</span>
              <Button size="low" tone="quiet" className="ml-auto" aria-label={`Declare ${a.name} of ${a.claim} as used`} onClick={() => onFix({ words: `Declared ${a.name}`, field: `claims.${index}.settings.${a.name}`, value: a.value })}>Declare as used</Button>
              {a.notes.length > 0 && <div className="basis-full text-small">{a.notes.map((note) => <ConventionSentence key={note.id} note={note} />)}</div>}
            </li>
          );
        })}
      </ul>
    </Disclosure>
  );
}
