/** Rows of every list and table of the page that lead somewhere; a row inside another counts as part of it. */
const ROWS = 'main [data-listed], main tbody > tr';
const CONTROLS = 'a[href], button, summary, input, select, textarea';
const TYPING = 'input:not([type=checkbox], [type=radio], [type=button], [type=submit]), textarea, select, [contenteditable]';
/** Where arrows and letters have a meaning of their own, or another part of the page is in front. */
const KEPT = '[role=menu], [role=dialog], [role=listbox], [role=tablist], [role=radiogroup]';

const isSeen = (element: Element): boolean => element.getClientRects().length > 0;

function rows(): readonly HTMLElement[] {
  return [...document.querySelectorAll<HTMLElement>(ROWS)].filter((row) => isSeen(row) && (row.hasAttribute('data-listed') || row.querySelector(CONTROLS)) && !row.parentElement?.closest('[data-listed]'));
}

export const isTyping = (target: EventTarget | null): boolean => target instanceof Element && target.closest(TYPING) !== null;

/** True while a dialog or menu has the keyboard, or the place has keys of its own. */
export const isKept = (target: EventTarget | null): boolean => target instanceof Element && target.closest(KEPT) !== null;

export const isInRow = (target: EventTarget | null): boolean => target instanceof Element && target.closest(ROWS) !== null;

/** To the next row, or the one before; from outside any row to the first one below the place where one is. */
export function walk(step: 1 | -1): boolean {
  const all = rows();
  const at = document.activeElement;
  const here = all.findIndex((row) => row === at || row.contains(at));
  const next = here >= 0 ? all[here + step] : step === 1 ? all[0] : all.at(-1);
  if (!next) return false;
  // A row of fields takes the focus itself: in a field the next letter would be typed.
  const target = next.hasAttribute('data-listed') ? next : next.querySelector<HTMLElement>(CONTROLS);
  target?.focus();
  target?.scrollIntoView({ block: 'nearest' });
  return target !== null;
}

/** From a row that has the focus itself to the first thing in it. */
export function enterRow(): boolean {
  const row = document.activeElement;
  if (!(row instanceof HTMLElement) || !row.hasAttribute('data-listed')) return false;
  row.querySelector<HTMLElement>(CONTROLS)?.focus();
  return true;
}
