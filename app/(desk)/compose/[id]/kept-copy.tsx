'use client';
import { useEffect, useState } from 'react';
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

/** Offers what was written in this browser and never reached the server. */
export function KeptCopy({ id, form, onUse }: KeptProps) {
  const [kept, setKept] = useState<ComposerFields | null>(null);
  useEffect(() => {
    const found = readKept(id);
    if (found && JSON.stringify(found) !== JSON.stringify(form.getValues())) setKept(found);
    else forget(id);
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
