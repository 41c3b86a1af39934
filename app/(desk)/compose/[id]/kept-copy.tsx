'use client';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import type { ComposerFields } from './fields';
import { forget, readKept } from './save-draft';
import type { ComposerForm } from './waveform-part';

interface KeptProps {
  readonly id: string;
  readonly form: ComposerForm;
  readonly onUse: (fields: ComposerFields) => void;
}

const never = () => () => undefined;

/** Offers what was written in this browser and never reached the server. The server cannot know it, so it is drawn once the page lives. */
export function KeptCopy(props: KeptProps) {
  const living = useSyncExternalStore(never, () => true, () => false);
  return living && <Kept {...props} />;
}

/** What was kept when the page was opened, where it differs from what was saved. */
function foundAtFirst(id: string, form: ComposerForm): ComposerFields | null {
  const found = readKept(id);
  return found && JSON.stringify(found) !== JSON.stringify(form.getValues()) ? found : null;
}

function Kept({ id, form, onUse }: KeptProps) {
  const [kept, setKept] = useState(() => foundAtFirst(id, form));
  useEffect(() => {
    if (foundAtFirst(id, form) === null) forget(id);
  }, [id, form]);
  if (!kept) return null;
  const use = () => { onUse(kept); setKept(null); };
  const drop = () => { forget(id); setKept(null); };
  return (
    <Notice kind="look" word="Kept here" actions={<><Button size="low" tone="main" onClick={use}>Use the kept copy</Button><Button size="low" onClick={drop}>Stay with what is saved</Button></>}>
      <p>This browser keeps a copy of this draft that never reached the server{kept.title && `, titled “${kept.title}”`}, with {kept.claims.length} {kept.claims.length === 1 ? 'claim' : 'claims'}.</p>
    </Notice>
  );
}
