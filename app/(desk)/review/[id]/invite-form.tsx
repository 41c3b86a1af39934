'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import type { RefereeCandidateView } from '@/lib/services/reviews/invitation-view';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { inviteReferee } from '../actions';

const has = (candidate: RefereeCandidateView | undefined, level: 'bar' | 'ask'): boolean => candidate?.flags.some((f) => f.level === level) ?? false;

/** What speaks against a person and how much they carry is said before they are asked. */
export function InviteForm({ submissionId, candidates }: { readonly submissionId: string; readonly candidates: readonly RefereeCandidateView[] }) {
  const [userId, setUserId] = useState('');
  const [reason, setReason] = useState('');
  const { busy, trouble, run } = useAct(inviteReferee, () => { setUserId(''); setReason(''); });
  const chosen = candidates.find((c) => c.userId === userId);
  if (candidates.length === 0) return <p className="text-ui text-ink-2">There is nobody else to ask here yet.</p>;
  return (
    <form className="grid gap-3 border-t border-hair-2 pt-3" onSubmit={(e) => { e.preventDefault(); void run({ id: submissionId, invitation: { refereeId: userId, ...(reason.trim() ? { reason: reason.trim() } : {}) } }); }}>
      <SelectField label="Ask a referee" required value={userId} onChange={(e) => setUserId(e.target.value)}>
        <option value="">choose a person</option>
        {candidates.map((c) => <option key={c.userId} value={c.userId} disabled={has(c, 'bar')}>{c.name}{c.affiliation ? `, ${c.affiliation}` : ''} · {c.load} open{has(c, 'bar') ? ' · barred' : has(c, 'ask') ? ' · flag' : ''}</option>)}
      </SelectField>
      {chosen && chosen.flags.length > 0 && <ul className="grid gap-0.5 text-small">{chosen.flags.map((f) => <li key={f.code}><strong>{f.level}</strong>: {f.text}</li>)}</ul>}
      {has(chosen, 'ask') && <TextField label="Why this is no bar" required maxLength={500} value={reason} onChange={(e) => setReason(e.target.value)} hint="One sentence; it is kept with the invitation." />}
      <div><Button type="submit" tone="main" size="low" busy={busy ? 'Inviting' : null}>Invite</Button></div>
      <Trouble trouble={trouble} />
    </form>
  );
}
