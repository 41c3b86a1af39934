'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextareaField } from '@/app/_ui/primitives/control';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { noteToEditor } from '../actions';

export function NoteForm({ submissionId }: { readonly submissionId: string }) {
  const [body, setBody] = useState('');
  const { busy, trouble, run } = useAct(noteToEditor, () => setBody(''));
  return (
    <form className="grid gap-2" onSubmit={(e) => { e.preventDefault(); void run({ id: submissionId, note: { body } }); }}>
      <TextareaField label="Note to the editor" required maxLength={10_000} value={body} onChange={(e) => setBody(e.target.value)} hint="Plain text. Authors and other referees never see it." />
      <div><Button type="submit" size="low" busy={busy ? 'Sending' : null}>Send the note</Button></div>
      <Trouble trouble={trouble} />
    </form>
  );
}
