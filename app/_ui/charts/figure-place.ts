import type { Figure } from '@/lib/engine/contract/measurement';

/** `beside`: next to the settings, where claimed and recomputed are seen together; `below`: across both halves. */
export type FigurePlace = 'beside' | 'below';

/** Waveforms and a sweep stand beside; where there is no sweep, the next figure takes its room. */
export function figuresAt(place: FigurePlace, figures: readonly Figure[]): readonly Figure[] {
  const beside = figures.filter((figure) => figure.kind === 'waveforms' || figure.kind === 'sweep');
  const others = figures.filter((figure) => !beside.includes(figure));
  if (!beside.some((figure) => figure.kind === 'sweep')) beside.push(...others.splice(0, 1));
  return place === 'beside' ? beside : others;
}
