'use client';
import { useRouter } from 'next/navigation';
import { useCallback } from 'react';
import { ProgressBar } from '@/app/_ui/primitives/progress';
import { useProgress } from '../../compose/[id]/use-progress';

/** Draws the page anew when the run has ended, and says how far it is until then. */
export function FollowRun({ id, running }: { readonly id: string; readonly running: boolean }) {
  const router = useRouter();
  const look = useCallback(() => router.refresh(), [router]);
  const now = useProgress(id, running, look);
  if (!running || !now) return null;
  return (
    <div className="wrap pt-4">
      <p className="text-ui text-ink-2">{now.doing || 'The run is under way'}</p>
      <ProgressBar label={now.doing || 'The run'} fraction={now.fraction} />
    </div>
  );
}
