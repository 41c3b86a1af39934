/** What the data themselves say of a convention, beside what is declared. It changes no number. */
export interface Guess {
  readonly about: 'rotation' | 'time-unit' | 'variable' | 'normalisation';
  /** Its row in the catalogue of conventions, such as C22. */
  readonly convention: string;
  readonly declared: string;
  readonly proposed: string;
  readonly agrees: boolean;
  /** From 0 to 1; a judgement of how seldom the sign deceives, no computed probability. */
  readonly confidence: number;
  /** One sentence with the measured number and the expected one. */
  readonly reason: string;
}
