'use client';
import { useEffect } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';

/** Keeps a form's text in this browser while it is being written; returns how to forget it. */
export function useKept<F extends FieldValues>(form: UseFormReturn<F>, name: string): () => void {
  const { reset, watch, getValues } = form;
  useEffect(() => {
    const kept = readKept<F>(name);
    if (kept) reset({ ...getValues(), ...kept });
    const { unsubscribe } = watch((values) => keep(name, values));
    return unsubscribe;
  }, [getValues, name, reset, watch]);
  return () => {
    try { localStorage.removeItem(name); } catch { /* A browser that keeps nothing has nothing to forget. */ }
  };
}

function readKept<F>(name: string): Partial<F> | null {
  try {
    return JSON.parse(localStorage.getItem(name) ?? 'null') as Partial<F> | null;
  } catch {
    return null;
  }
}

function keep(name: string, values: unknown): void {
  try { localStorage.setItem(name, JSON.stringify(values)); } catch { /* Full or refused: the page itself still holds the text. */ }
}
