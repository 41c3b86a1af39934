import type { Place } from '@/lib/kernel/place';

export type FindingLevel = 'stops-lodging' | 'needs-answer' | 'worth-a-look' | 'note';

/** A message about the data, with numbers and place (codes and levels: settings.md section 8). */
export interface Finding {
  readonly code: string;
  readonly level: FindingLevel;
  readonly text: string;
  /** Waveform, noise curve or claim name; a file and line where there is one. */
  readonly where: string;
  /** A next step that would settle it, where one exists. */
  readonly fix?: string;
  /** The point of a sweep that it speaks of; absent where it speaks of the claim. */
  readonly at?: Place;
}
