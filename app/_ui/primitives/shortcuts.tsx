'use client';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { tinykeys } from 'tinykeys';
import { Dialog } from './dialog';
import { enterRow, isInRow, isKept, isTyping, walk } from './list-walk';

const KEPT_AS = 'shortcuts';
const listeners = new Set<() => void>();

/** On unless this browser was told otherwise. A browser that keeps nothing keeps them on. */
function areOn(): boolean {
  try { return localStorage.getItem(KEPT_AS) !== 'off'; } catch { return true; }
}

function turn(on: boolean): void {
  try { localStorage.setItem(KEPT_AS, on ? 'on' : 'off'); } catch { /* For this page only, then: nothing can be kept. */ }
  listeners.forEach((tell) => tell());
}

const subscribe = (tell: () => void): (() => void) => {
  listeners.add(tell);
  window.addEventListener('storage', tell);
  return () => {
    listeners.delete(tell);
    window.removeEventListener('storage', tell);
  };
};

const keys: readonly (readonly [keys: readonly string[], does: string])[] = [
  [['j', '↓'], 'to the next row of a list; ↓ once a row has the focus'],
  [['k', '↑'], 'to the row before'],
  [['Enter'], 'opens the row, or goes into its fields'],
  [['?'], 'opens and closes this list'],
];

/** Letters act only while nothing is being typed, and not at all once they are switched off. */
function useShortcuts(on: boolean, toggle: () => void): void {
  useEffect(() => {
    if (!on) return;
    const when = (fits: (target: EventTarget | null) => boolean, act: () => boolean) => (event: KeyboardEvent) => {
      if (event.defaultPrevented || event.isComposing || isTyping(event.target) || !fits(event.target)) return;
      if (act()) event.preventDefault();
    };
    const free = (target: EventTarget | null) => !isKept(target);
    const help = when(() => true, () => { toggle(); return true; });
    return tinykeys(window, {
      j: when(free, () => walk(1)),
      k: when(free, () => walk(-1)),
      ArrowDown: when((target) => free(target) && isInRow(target), () => walk(1)),
      ArrowUp: when((target) => free(target) && isInRow(target), () => walk(-1)),
      Enter: when((target) => target === document.activeElement, enterRow),
      'Shift+?': help,
      '?': help,
    });
  }, [on, toggle]);
}

/** The way to the list of keys, and the switch that turns them off. It is a button, so that it is there without them. */
export function Shortcuts() {
  const on = useSyncExternalStore(subscribe, areOn, () => true);
  const [open, setOpen] = useState(false);
  const [toggle] = useState(() => () => setOpen((now) => !now));
  useShortcuts(on, toggle);
  return (
    <Dialog title="Keys" open={open} onOpenChange={setOpen} trigger={<button type="button" className="inline-flex min-h-8 cursor-pointer items-center text-ink-2 underline">Keyboard</button>}>
      <table className="tbl">
        <caption className="sr-only">Keys and what they do</caption>
        <thead><tr><th scope="col">Key</th><th scope="col">Does</th></tr></thead>
        <tbody>{keys.map(([pressed, does]) => <tr key={does}><th scope="row">{pressed.map((key, i) => <span key={key}>{i > 0 && ' or '}<kbd className="rounded border border-control px-1.5 font-code text-code">{key}</kbd></span>)}</th><td>{does}</td></tr>)}</tbody>
      </table>
      <label className="mt-4 flex min-h-8 items-center gap-2 text-ui">
        <input type="checkbox" className="size-4" checked={on} onChange={(event) => turn(event.target.checked)} />
        These keys are on in this browser
      </label>
      <p className="mt-1 text-small text-ink-2">They never act while something is typed. Tab, Enter and the arrow keys inside fields work as ever, on or off.</p>
    </Dialog>
  );
}
