'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { ActionResult } from '@/lib/http/define-action';

export interface ActState {
  readonly busy: boolean;
  /** What stood in the way, as sentences; null when nothing did. */
  readonly trouble: readonly string[] | null;
}

const OFFLINE = 'The server could not be reached. Nothing was lost; try again when you are online.';

/** Runs a server action once at a time, keeps what came of it in sight, and draws the page anew after success. */
export function useAct<I, T>(act: (input: I) => Promise<ActionResult<T>>, then?: (value: T) => void) {
  const router = useRouter();
  const [state, setState] = useState<ActState>({ busy: false, trouble: null });
  const run = async (input: I): Promise<boolean> => {
    if (state.busy) return false;
    setState({ busy: true, trouble: null });
    const result = await act(input).catch(() => null);
    if (!result?.ok) {
      setState({ busy: false, trouble: result ? troubleOf(result.error) : [OFFLINE] });
      return false;
    }
    setState({ busy: false, trouble: null });
    then?.(result.value);
    router.refresh();
    return true;
  };
  return { ...state, run };
}

type Trouble = Extract<ActionResult<unknown>, { ok: false }>['error'];

function troubleOf(error: Trouble): string[] {
  const problems = (error.problems ?? []).map((p) => `${p.where}: saw ${p.saw}; expected ${p.expected}.`);
  const reference = error.reference ? [`Reference for the administrator: ${error.reference}`] : [];
  return [error.sentence, ...problems, ...reference];
}
