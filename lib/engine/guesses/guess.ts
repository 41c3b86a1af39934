/** What a guess is of. */
export const guessTopics = ['rotation', 'time-unit', 'variable', 'normalisation', 'negative-m', 'mass-ratio', 'labels', 'spin', 'total-mass', 'noise-column', 'sided', 'curve-frequency', 'curve-version'] as const;
export type GuessTopic = (typeof guessTopics)[number];

/** What the data themselves say of a convention, beside what is declared. It changes no number. */
export interface Guess {
  readonly about: GuessTopic;
  /** Its row in the catalogue of conventions, such as C22; null for the unit of time, which has none. */
  readonly convention: `C${number}` | null;
  readonly declared: string;
  readonly proposed: string;
  /** The same as a word or number of a sheet; null where no word of a sheet says it. */
  readonly value: string | number | null;
  readonly agrees: boolean;
  /** The published curve that is spoken of, where it is of one. */
  readonly curve?: string;
  /** From 0 to 1; a judgement of how seldom the sign deceives, no computed probability. */
  readonly confidence: number;
  /** One sentence with the measured number and the expected one. */
  readonly reason: string;
}
