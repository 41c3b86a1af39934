'use client';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { Button, type ButtonSize } from '@/app/_ui/primitives/button';
import { Trouble } from '../act-parts';
import { duplicate } from '../compose/actions';
import { useAct } from '../use-act';

interface DuplicateProps {
  readonly id: string;
  readonly title: string;
  /** An earlier revision; the current one unless given. */
  readonly revision?: number;
  readonly size?: ButtonSize;
}

/** A new draft from what was written here: sheet, statement and files, which are not sent again. */
export function Duplicate({ id, title, revision, size = 'low' }: DuplicateProps) {
  const router = useRouter();
  const copying = useAct(duplicate, (made) => router.push(`/compose/${made.id}` as Route));
  return (
    <span className="inline-grid gap-2">
      <Button size={size} tone={size === 'low' ? 'quiet' : 'plain'} aria-label={`Duplicate ${title || 'the untitled draft'}`} busy={copying.busy ? 'Copying' : null} onClick={() => void copying.run({ id, ...(revision !== undefined && { revision }) })}>Duplicate</Button>
      <Trouble trouble={copying.trouble} />
    </span>
  );
}
