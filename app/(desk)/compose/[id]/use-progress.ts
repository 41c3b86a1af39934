'use client';
import { useEffect, useState } from 'react';
import type { ProgressEvent } from '@/lib/services/submissions/submission-view';

const POLL_MS = 3000;

/**
 * Follows a run while one is under way: by the server's events, or by looking again every few seconds
 * where a proxy swallows them. `look` reads the page anew; it is called when the run ends.
 */
export function useProgress(submissionId: string, running: boolean, look: () => void): Pick<ProgressEvent, 'runId' | 'fraction' | 'doing'> | null {
  const [now, setNow] = useState<Pick<ProgressEvent, 'runId' | 'fraction' | 'doing'> | null>(null);
  useEffect(() => {
    if (!running) return;
    let heard = Date.now();
    const source = new EventSource(`/api/v1/submissions/${submissionId}/events`);
    source.addEventListener('progress', (event: MessageEvent<string>) => {
      heard = Date.now();
      const said = JSON.parse(event.data) as ProgressEvent;
      setNow({ runId: said.runId, fraction: said.fraction, doing: said.doing });
      if (said.state === 'finished' || said.state === 'stopped') look();
    });
    source.addEventListener('end', () => {
      source.close();
      look();
    });
    const poll = setInterval(() => { if (source.readyState === EventSource.CLOSED || Date.now() - heard > 2 * POLL_MS) look(); }, POLL_MS);
    return () => {
      source.close();
      clearInterval(poll);
      setNow(null);
    };
  }, [submissionId, running, look]);
  return running ? now : null;
}
