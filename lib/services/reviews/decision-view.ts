import type { DecisionKind, DecisionRemark, Level, LevelRefusal } from '@/lib/reviews/decision';
import type { LetterNumber, LetterPoint } from '@/lib/reviews/letter';

/** A decision with its letter. A letter is never changed afterwards. */
export interface DecisionView {
  readonly id: string;
  readonly kind: DecisionKind;
  readonly round: number;
  readonly revision: number;
  readonly by: string;
  readonly at: string;
  readonly level: Level | null;
  readonly remarks: readonly DecisionRemark[];
  /** Ids of the claims the level covers; empty unless the kind is `enter`. */
  readonly covers: readonly string[];
  readonly letter: { readonly numbers: readonly LetterNumber[]; readonly points: readonly LetterPoint[]; readonly prose: string };
  /** One sentence for the record's public page, where the editor wrote one. */
  readonly publicSentence: string;
  /** `enter` only: is the record signed, waiting for the signer, or was it refused (with the reason, for the editor). */
  readonly signing:
    | { readonly state: 'not-needed' | 'waiting' }
    | { readonly state: 'signed'; readonly recordId: string }
    | { readonly state: 'refused'; readonly reason: string };
}

/** What the decision page starts from. */
export interface DecisionDraftView {
  readonly levels: readonly { readonly level: Level; readonly open: boolean; readonly covers: readonly string[]; readonly refusals: readonly LevelRefusal[] }[];
  readonly remarks: readonly DecisionRemark[];
  readonly letter: { readonly numbers: readonly LetterNumber[]; readonly points: readonly LetterPoint[] };
  /** Typed to sign: the title's first three words. */
  readonly signingWords: string;
}
