'use client';
import { useCallback, useState } from 'react';
import { Dialog } from '../../primitives/dialog';
import { say } from '../../primitives/toaster';

interface Refused {
  readonly text: string;
  readonly what: string;
}

async function toClipboard(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    // No permission, no secure address, or no clipboard at all: the reader copies by hand.
    return false;
  }
}

/** Copies and says so; what the browser refuses stays in `refused` until it has been copied by hand. */
export function useCopy() {
  const [refused, setRefused] = useState<Refused | null>(null);
  const copy = useCallback(async (text: string, what: string) => {
    if (await toClipboard(text)) say(`Copied ${what}.`);
    else setRefused({ text, what });
  }, []);
  return { copy, refused, forget: () => setRefused(null) };
}

/** The text in a box, all of it chosen already, for browsers that keep their clipboard to themselves. */
export function CopyByHand({ text, what, onClose }: Refused & { readonly onClose: () => void }) {
  return (
    <Dialog title="Copy by hand" description={`The browser did not let the page copy ${what}. All of it is selected here: copy it with Ctrl+C, or ⌘C.`} open onOpenChange={(open) => { if (!open) onClose(); }}>
      <textarea ref={(box) => box?.select()} readOnly rows={10} aria-label={`Text of ${what}`} defaultValue={text} className="w-full rounded border border-control bg-page p-2 font-code text-code" />
    </Dialog>
  );
}
