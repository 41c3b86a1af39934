'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { formatProblem } from '@/lib/kernel/problem';
import type { ActionResult } from '@/lib/http/define-action';

const OFFLINE = 'The server could not be reached. Nothing was changed; try again when you are online.';

/** Runs one of this page's acts, keeps what stood in its way in sight, and draws the list anew. */
export function useTokenAct<I, T>(act: (input: I) => Promise<ActionResult<T>>, then?: (value: T) => void) {
  const router = useRouter();
  const [state, setState] = useState<{ readonly busy: boolean; readonly trouble: string | null }>({ busy: false, trouble: null });
  const run = async (input: I): Promise<void> => {
    if (state.busy) return;
    setState({ busy: true, trouble: null });
    const done = await act(input).catch(() => null);
    if (done?.ok) {
      setState({ busy: false, trouble: null });
      then?.(done.value);
      router.refresh();
    } else setState({ busy: false, trouble: done ? [done.error.sentence, ...(done.error.problems ?? []).map(formatProblem)].join(' ') : OFFLINE });
  };
  return { ...state, run };
}
