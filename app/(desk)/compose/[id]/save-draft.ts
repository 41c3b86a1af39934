'use client';
import { useCallback, useEffect, useRef, useState, type RefObject } from 'react';
import type { UseFormReturn } from 'react-hook-form';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { saveDraft } from '../actions';
import { sheetFromFields, type ComposerFields } from './fields';

export type SaveState =
  /** `waiting`: a check runs, and the server takes changes again when it has ended. */
  | { readonly kind: 'saved' | 'changed' | 'saving' | 'waiting' }
  /** Kept in this browser only; `why` says what stood in the way. */
  | { readonly kind: 'kept-here'; readonly why: string }
  | { readonly kind: 'conflict'; readonly why: string };

const PAUSE_MS = 900;
const OFFLINE = 'The server could not be reached. What you wrote is kept in this browser and is sent when the connection is back.';

export const keptName = (id: string): string => `draft:${id}`;

type Form = UseFormReturn<ComposerFields>;

/** One save after the other, each on the version that the one before it made. */
function useSaves(id: string, version: RefObject<number>, form: Form, setState: (state: SaveState) => void) {
  const queue = useRef<Promise<boolean>>(Promise.resolve(true));
  const edits = useRef(0);
  const save = useCallback((): Promise<boolean> => {
    const step = async (): Promise<boolean> => {
      const { title, statement, ...rest } = form.getValues();
      const upTo = edits.current;
      setState({ kind: 'saving' });
      const change = { version: version.current, title, statement, sheet: sheetFromFields({ title, statement, ...rest }) };
      const result = await saveDraft({ id, change }).catch(() => null);
      if (!result?.ok) {
        setState(!result ? { kind: 'kept-here', why: OFFLINE } : { kind: result.error.code === 'conflict' ? 'conflict' : 'kept-here', why: [result.error.sentence, ...(result.error.problems ?? []).map((p) => `${p.where}: ${p.expected}.`)].join(' ') });
        return false;
      }
      version.current = result.value.version;
      const more = edits.current !== upTo;
      if (!more) forget(id);
      setState({ kind: more ? 'changed' : 'saved' });
      return true;
    };
    queue.current = queue.current.then(step, step);
    return queue.current;
  }, [form, id, setState, version]);
  return { save, edits };
}

/**
 * Saves a moment after the last keystroke, on the version it was made on; keeps a copy here until it
 * is saved. While `paused`, nothing is sent; what changed meanwhile is sent at the end.
 */
export function useAutosave(id: string, initialVersion: number, form: Form, paused: boolean) {
  const [state, setState] = useState<SaveState>({ kind: 'saved' });
  const version = useRef(initialVersion);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const { save, edits } = useSaves(id, version, form, setState);

  const saveNow = useCallback((): Promise<boolean> => {
    clearTimeout(timer.current);
    return save();
  }, [save]);

  useEffect(() => {
    const changed = () => {
      edits.current++;
      keep(id, form.getValues());
      setState((now) => (now.kind === 'conflict' ? now : { kind: paused ? 'waiting' : 'changed' }));
      clearTimeout(timer.current);
      if (!paused) timer.current = setTimeout(() => void save(), PAUSE_MS);
    };
    const unsubscribe = form.subscribe({ formState: { values: true }, callback: changed });
    const again = () => { if (readKept(id)) void saveNow(); };
    window.addEventListener('online', again);
    return () => {
      unsubscribe();
      clearTimeout(timer.current);
      window.removeEventListener('online', again);
    };
  }, [form, id, paused, save, saveNow, edits]);

  useEffect(() => {
    if (!paused && state.kind === 'waiting') void save();
  }, [paused, state.kind, save]);

  /** After a conflict: the next save is made on the version that was chosen against. */
  const takeVersion = useCallback((next: number) => { version.current = next; setState({ kind: 'changed' }); }, []);
  return { state, saveNow, takeVersion, version };
}

function keep(id: string, fields: unknown): void {
  try { localStorage.setItem(keptName(id), JSON.stringify(fields)); } catch { /* A full store must not stop the writing. */ }
}

export function forget(id: string): void {
  try { localStorage.removeItem(keptName(id)); } catch { /* Nothing was kept. */ }
}

/** What was written here and never reached the server. */
export function readKept(id: string): ComposerFields | null {
  try {
    return JSON.parse(localStorage.getItem(keptName(id)) ?? 'null') as ComposerFields | null;
  } catch {
    return null;
  }
}

/** The other writer's version, for the comparison after a conflict. */
export async function fetchTheirs(id: string): Promise<{ readonly version: number; readonly sheet: DraftSheet } | null> {
  const response = await fetch(`/api/v1/submissions/${id}`, { headers: { accept: 'application/json' } }).catch(() => null);
  if (!response?.ok) return null;
  const view = (await response.json()) as { readonly revision?: { readonly version: number; readonly sheet: DraftSheet } };
  return view.revision ? { version: view.revision.version, sheet: view.revision.sheet } : null;
}
