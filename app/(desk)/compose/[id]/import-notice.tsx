'use client';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import type { useImport } from './use-import';

const count = (n: number, one: string): string => `${n} ${n === 1 ? one : `${one}s`}`;

/** What came in, before it touches what is there. */
export function ImportNotice({ state }: { readonly state: ReturnType<typeof useImport> }) {
  const { incoming, trouble } = state;
  if (trouble) return <Notice kind="stop" live="alert" word="Not loaded" actions={<Button size="low" onClick={state.leave}>Close</Button>}>{trouble.map((sentence) => <p key={sentence}>{sentence}</p>)}</Notice>;
  if (!incoming) return null;
  const actions = (
    <>
      <Button size="low" tone="main" onClick={state.merge}>Add to this draft</Button>
      <Button size="low" onClick={state.replace}>Replace the sheet</Button>
      <Button size="low" tone="quiet" onClick={state.leave}>Leave it out</Button>
    </>
  );
  return (
    <Notice kind="ask" live="status" word="claim.json" actions={actions}>
      <p>{incoming.title && `“${incoming.title}”, with `}{count(Object.keys(incoming.waveforms).length, 'waveform')}, {count(Object.keys(incoming.noise).length, 'noise curve')} and {count(incoming.claims.length, 'claim')}. Added, it changes nothing that is here; names that are taken get another. Either way can be undone.</p>
    </Notice>
  );
}
