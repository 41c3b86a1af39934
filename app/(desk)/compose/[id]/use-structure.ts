'use client';
import { useCallback, useEffect, useState } from 'react';
import type { StructureView } from '@/lib/services/files/structure-schema';
import { refusalOf } from './upload';

export type StructureState =
  | { readonly kind: 'loading' }
  | { readonly kind: 'here'; readonly structure: StructureView }
  | { readonly kind: 'failed'; readonly why: string };

const noConnection = 'The list of datasets did not arrive: the connection broke.';

async function fetchStructure(address: string, signal: AbortSignal): Promise<StructureState> {
  try {
    const answer = await fetch(address, { signal });
    const body = await answer.text();
    return answer.ok ? { kind: 'here', structure: JSON.parse(body) as StructureView } : { kind: 'failed', why: refusalOf(answer.status, body) };
  } catch {
    return { kind: 'failed', why: noConnection };
  }
}

/** What a file of arrays holds, read on the server; asked for anew when the file is another one. */
export function useStructure(submissionId: string, fileId: string): { readonly state: StructureState; readonly retry: () => void } {
  const [turn, setTurn] = useState(0);
  const address = `/api/v1/submissions/${submissionId}/files/${fileId}/structure`;
  const [read, setRead] = useState<{ readonly of: string; readonly state: StructureState } | null>(null);
  const wanted = `${turn} ${address}`;
  useEffect(() => {
    const stop = new AbortController();
    void fetchStructure(address, stop.signal).then((state) => {
      if (!stop.signal.aborted) setRead({ of: wanted, state });
    });
    return () => stop.abort();
  }, [address, wanted]);
  const retry = useCallback(() => setTurn((n) => n + 1), []);
  return { state: read?.of === wanted ? read.state : { kind: 'loading' }, retry };
}
