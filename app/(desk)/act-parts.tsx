'use client';
import type { ReactNode } from 'react';
import { Button, type ButtonSize, type ButtonTone } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import type { ActionResult } from '@/lib/http/define-action';
import { useAct } from './use-act';

/** What stood in the way of the reader's own act. */
export function Trouble({ trouble }: { readonly trouble: readonly string[] | null }) {
  if (!trouble) return null;
  return (
    <Notice kind="stop" live="alert" word="Not done">
      {trouble.map((sentence) => <p key={sentence}>{sentence}</p>)}
    </Notice>
  );
}

interface ActButtonProps<I> {
  readonly act: (input: I) => Promise<ActionResult<unknown>>;
  readonly input: I;
  readonly busy: string;
  readonly tone?: ButtonTone;
  readonly size?: ButtonSize;
  readonly children: ReactNode;
}

/** One act, one button: what it does is said while it does it, and what stood in the way stays beneath it. */
export function ActButton<I>({ act, input, busy, tone, size, children }: ActButtonProps<I>) {
  const state = useAct(act);
  return (
    <span className="inline-grid gap-2">
      <Button tone={tone} size={size} busy={state.busy ? busy : null} onClick={() => void state.run(input)}>{children}</Button>
      <Trouble trouble={state.trouble} />
    </span>
  );
}
