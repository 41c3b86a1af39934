import type { Figure } from '@/lib/engine/contract/measurement';

/** `beside`: next to the settings, where claimed and recomputed are seen together; `below`: across both halves. */
export type FigurePlace = 'beside' | 'below';

const isBeside = (figure: Figure) => figure.kind === 'waveforms' || figure.kind === 'sweep';

export const figuresAt = (place: FigurePlace, figures: readonly Figure[]): readonly Figure[] => figures.filter((figure) => isBeside(figure) === (place === 'beside'));
