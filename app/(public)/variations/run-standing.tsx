'use client';
import { useRouter } from 'next/navigation';
import { useCallback } from 'react';
import { useProgress } from '@/app/(desk)/compose/[id]/use-progress';
import { StopRun } from '@/app/(desk)/runs/stop-run';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import { OfflineStrap } from '@/app/_ui/primitives/offline-strap';
import { ProgressBar } from '@/app/_ui/primitives/progress';
import { formatProblem } from '@/lib/kernel/problem';
import type { VariedRun } from '@/lib/services/variations/variation-view';
import { isUnderWay } from '@/lib/services/runs/under-way';

interface StandingProps {
  readonly submissionId: string;
  readonly runId: string;
  readonly run: Exclude<VariedRun, { readonly state: 'measured' }>;
  /** Only one's own runs send their progress; others look again. */
  readonly follow: boolean;
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** How the rerun stands until its number is there, or why none came. */
export function RunStanding({ submissionId, runId, run, follow }: StandingProps) {
  const router = useRouter();
  const look = useCallback(() => router.refresh(), [router]);
  const live = isUnderWay(run);
  const now = useProgress(submissionId, live && follow, look);
  if (run.state === 'stopped') return <Notice kind="stop" word="Stopped"><p>{run.because}</p></Notice>;
  if (run.state === 'refused') return <Notice kind="stop" word="Refused">{run.problems.map((problem) => <p key={problem.where}>{formatProblem(problem)}</p>)}</Notice>;
  const told = now?.runId === runId ? now : run;
  const words = capital(told.doing) || (run.state === 'queued' ? 'Waiting for a worker' : 'Under way');
  return (
    <div className="grid max-w-[68ch] gap-2">
      <OfflineStrap>The rerun goes on without you; its number is here when the connection is back.</OfflineStrap>
      <p className="text-ui" role="status">{words}. The varied number takes its place when the run has ended; this page can be left meanwhile.</p>
      <ProgressBar label="The variation" fraction={told.fraction} />
      {follow && <StopRun id={submissionId} runId={runId} what="variation" />}
      {!follow && <div><Button size="low" onClick={look}>Look again</Button></div>}
    </div>
  );
}
