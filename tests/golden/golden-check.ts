import { expect, it } from 'vitest';

/**
 * One golden check: a value that does not come from this project. `required` says on what authority:
 * published (read in a source, or a closed form anyone can evaluate), independent derivation (computed by
 * another program or by hand, with no code in common; `source` says by which method, for the program is not
 * kept here), from memory (expected form, not confirmed in a source), or common practice (a rule of thumb
 * without a source).
 */
export interface GoldenCheck {
  /** Short name, and the id in the reference list where it has one. */
  readonly id: string;
  readonly what: string;
  readonly required: 'published' | 'independent derivation' | 'from memory' | 'common practice';
  readonly source: string;
  readonly value: number;
  /** Largest |computed/value − 1|. */
  readonly relative: number;
  readonly why?: string;
  readonly compute: () => number;
}

export function goldenChecks(checks: readonly GoldenCheck[]): void {
  for (const { id, what, required, source, value, relative, compute } of checks)
    it(`${id}: ${what} (${required}: ${source})`, () => {
      expect(compute()).toAgreeWith(value, { relative });
    });
}
