'use client';
import { useCallback, useEffect, useRef, useState } from 'react';
import type { Problem } from '@/lib/kernel/problem';
import type { Preview } from '@/lib/pipeline/preview';
import type { PreviewAsk, PreviewNote } from './preview-message';

export type PreviewState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'running'; readonly fraction: number; readonly doing: string }
  | { readonly kind: 'done'; readonly preview: Preview; readonly tookMs: number }
  | { readonly kind: 'refused'; readonly problems: readonly Problem[] }
  | { readonly kind: 'stopped'; readonly why: string };

/** A look that takes longer belongs on the server; so does one that would fill the browser's memory. */
export const LOOK_AT_MOST_S = 120;
export const LOOK_AT_MOST_MB = 256;

const sizeOf = (ask: PreviewAsk): number => (ask.kind === 'archive' ? ask.archive.size : ask.files.reduce((sum, { file }) => sum + file.size, 0));

/** One look at a time, in a worker of its own that is ended with it, whatever it was doing. */
export function usePreview() {
  const [state, setState] = useState<PreviewState>({ kind: 'idle' });
  const running = useRef<{ readonly end: () => void } | null>(null);

  const end = useCallback(() => {
    running.current?.end();
    running.current = null;
  }, []);
  useEffect(() => end, [end]);

  const stop = useCallback((why: string) => {
    end();
    setState({ kind: 'stopped', why });
  }, [end]);

  const start = useCallback((ask: PreviewAsk) => {
    end();
    const megabytes = sizeOf(ask) / 2 ** 20;
    if (megabytes > LOOK_AT_MOST_MB) return setState({ kind: 'stopped', why: `The files hold ${Math.round(megabytes)} MB; a browser is given at most ${LOOK_AT_MOST_MB} MB to look at. Make a draft of them: the server reads them in full.` });
    setState({ kind: 'running', fraction: 0, doing: 'opening the files' });
    const worker = new Worker(new URL('./preview-worker.ts', import.meta.url), { type: 'module' });
    const begun = performance.now();
    const limit = setTimeout(() => stop(`The look was ended after ${LOOK_AT_MOST_S} s. The server takes longer sheets; make a draft and check it.`), 1000 * LOOK_AT_MOST_S);
    running.current = { end: () => { clearTimeout(limit); worker.terminate(); } };
    worker.onmessage = ({ data }: MessageEvent<PreviewNote>) => {
      if (data.kind === 'progress') return setState({ kind: 'running', fraction: data.fraction, doing: data.doing });
      end();
      if (data.kind === 'guessed') return;
      setState(data.kind === 'done' ? { ...data, tookMs: performance.now() - begun } : data);
    };
    worker.onerror = (event) => {
      event.preventDefault();
      stop('The look broke off in this browser, for want of memory or by a fault of the program. Nothing was sent; the server may still be asked.');
    };
    worker.postMessage(ask);
  }, [end, stop]);

  return { state, start, cancel: () => stop('The look was stopped. Nothing was sent.') };
}
