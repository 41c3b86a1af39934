import type { KeyboardEvent } from 'react';

const cellName = /^claims\.(\d+)\.(.+)$/;

/** Enter and the arrow keys lead to the same cell of the claim above or below; in a list of choices the arrows keep choosing. */
export function moveInColumn(event: KeyboardEvent<HTMLElement>): void {
  const { target, key } = event;
  if (!(target instanceof HTMLInputElement || target instanceof HTMLSelectElement)) return;
  const arrows = target instanceof HTMLInputElement;
  const step = (key === 'Enter' && !event.shiftKey) || (arrows && key === 'ArrowDown') ? 1 : (key === 'Enter' && event.shiftKey) || (arrows && key === 'ArrowUp') ? -1 : 0;
  const [, index, field] = cellName.exec(target.name) ?? [];
  if (step === 0 || index === undefined || field === undefined) return;
  const next = document.getElementsByName(`claims.${Number(index) + step}.${field}`)[0];
  if (!next) return;
  event.preventDefault();
  next.focus();
  if (next instanceof HTMLInputElement) next.select();
}
