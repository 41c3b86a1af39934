'use client';
import { useState } from 'react';
import { useRouter } from 'next/navigation';
import { formatSetting } from '@/app/_ui/claim/setting-names';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField } from '@/app/_ui/primitives/control';
import { Dialog } from '@/app/_ui/primitives/dialog';
import { say } from '@/app/_ui/primitives/toaster';
import type { EarlierParts } from '@/lib/services/submissions/list-earlier-parts';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { listEarlier, takeOverFile } from '../actions';
import { settingText } from './claim-fields';
import { noiseNamed, type ComposerFields } from './fields';
import type { ComposerForm } from './waveform-part';

interface EarlierProps {
  readonly id: string;
  readonly form: ComposerForm;
  readonly files: readonly FileView[];
  readonly put: (fields: ComposerFields) => void;
}

type Noise = EarlierParts['noise'][number];
type Claim = EarlierParts['claims'][number];

/** Free among the names that are taken: `S`, then `S-2`. */
function free(wanted: string, taken: readonly string[]): string {
  let name = wanted;
  for (let i = 2; taken.includes(name); i++) name = `${wanted}-${i}`;
  return name;
}

/** Noise curves and settings of what one wrote before. */
export function FromEarlier({ id, form, files, put }: EarlierProps) {
  const router = useRouter();
  const [parts, setParts] = useState<readonly EarlierParts[] | null>(null);
  const [open, setOpen] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const show = async (next: boolean) => {
    setOpen(next);
    if (!next) return;
    setTrouble(null);
    const listed = await listEarlier({}).catch(() => null);
    if (listed?.ok) setParts(listed.value.filter((one) => one.submissionId !== id));
    else setTrouble(listed ? listed.error.sentence : 'The server could not be reached.');
  };
  const applied = (words: string, change: (fields: ComposerFields) => ComposerFields) => {
    const before = structuredClone(form.getValues());
    put(change(structuredClone(before)));
    say(words, () => put(before));
    setOpen(false);
  };
  const takeNoise = async (from: EarlierParts, noise: Noise) => {
    let declaration = noise.declaration;
    if (noise.file) {
      const same = files.find(({ sha256 }) => sha256 === noise.file?.sha256);
      const name = same?.name ?? free(noise.file.name, files.map((f) => f.name));
      const taken = same ? null : await takeOverFile({ id, from: { submissionId: from.submissionId, fileId: noise.file.id, name } }).catch(() => null);
      if (!same && !taken?.ok) return setTrouble(taken ? taken.error.sentence : 'The server could not be reached.');
      declaration = { ...declaration, file: name };
      router.refresh();
    }
    const name = free(noise.name, form.getValues('noise').map((n) => n.name));
    applied(`Noise curve ${name} is taken over.`, (fields) => ({ ...fields, noise: [...fields.noise, noiseNamed(name, declaration)] }));
  };
  const takeSettings = (claim: Claim, target: string) => {
    const settings = Object.fromEntries(Object.entries(claim.settings).map(([name, value]) => [name, settingText(value)]));
    applied(`The settings of ${claim.id} are taken over for ${target || 'every claim'}.`, (fields) => ({ ...fields, claims: fields.claims.map((own) => (target === '' || own.id === target ? { ...own, settings: { ...own.settings, ...Object.fromEntries(Object.entries(settings).filter(([name]) => name !== own.overSetting)) } } : own)) }));
  };
  return (
    <Dialog title="From an earlier submission" description="What you wrote before, the latest first. Files are taken over as they lie on the server and are not sent again." side="end" open={open} onOpenChange={(next) => void show(next)} trigger={<Button>From an earlier submission</Button>}>
      {trouble && <p role="alert" className="text-ui text-differs">{trouble}</p>}
      {!parts && !trouble && <p role="status" className="text-ui text-ink-2">Looking through your submissions</p>}
      {parts?.length === 0 && <p className="text-ui">You have no other submission with a noise curve or with settings yet.</p>}
      <ul className="grid gap-5">
        {parts?.map((from) => <Earlier key={from.submissionId} from={from} claims={form.getValues('claims').map((c) => c.id)} onNoise={(noise) => void takeNoise(from, noise)} onSettings={takeSettings} />)}
      </ul>
    </Dialog>
  );
}

interface OneProps {
  readonly from: EarlierParts;
  readonly claims: readonly string[];
  readonly onNoise: (noise: Noise) => void;
  readonly onSettings: (claim: Claim, target: string) => void;
}

function Earlier({ from, claims, onNoise, onSettings }: OneProps) {
  const [target, setTarget] = useState('');
  return (
    <li className="grid gap-2">
      <h3 className="text-ui font-semibold">{from.title || 'Untitled'} <span className="font-normal text-ink-2">revision {from.revision}</span></h3>
      <ul className="grid gap-1.5 text-ui">
        {from.noise.map((noise) => (
          <li key={noise.name} className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <span>Noise curve {noise.name}: {noise.file?.name ?? String(noise.declaration['curve'] ?? '')}</span>
            <Button size="low" className="ml-auto" aria-label={`Take over noise curve ${noise.name} of ${from.title}`} onClick={() => onNoise(noise)}>Take over</Button>
          </li>
        ))}
        {from.claims.map((claim, i) => (
          <li key={`${claim.id} ${i}`} className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <span className="min-w-0 [overflow-wrap:anywhere]">{claim.id}, {claim.quantity}: {Object.entries(claim.settings).map(([name, value]) => `${name} ${formatSetting(name, value)}`).join(', ')}</span>
            <Button size="low" className="ml-auto" aria-disabled={claims.length === 0 || undefined} aria-label={`Take over the settings of ${claim.id} of ${from.title}`} onClick={() => { if (claims.length > 0) onSettings(claim, target); }}>Take over</Button>
          </li>
        ))}
      </ul>
      {from.claims.length > 0 && claims.length > 0 && <SelectField label="Settings for" value={target} onChange={(e) => setTarget(e.target.value)}><option value="">every claim</option>{claims.map((c) => <option key={c}>{c}</option>)}</SelectField>}
    </li>
  );
}
