'use client';
import { Icon } from '../../primitives/icon';
import { CopyByHand, useCopy } from './copy-text';

interface CopyNumberProps {
  /** E.g. `C1 at 60 M⊙`. */
  readonly about: string;
  readonly sentence: string;
  /** The row beneath a comment that names its columns. */
  readonly row: string;
}

const look = 'grid size-8 place-items-center rounded text-ink-2 hover:bg-hover hover:text-link';

/** Beside a number: one click copies the sentence that states all of it, another the row of a table. */
export function CopyNumber({ about, sentence, row }: CopyNumberProps) {
  const { copy, refused, forget } = useCopy();
  return (
    <span className="copy-number">
      <button type="button" className={look} title="Copy the sentence" onClick={() => void copy(sentence, `the sentence of ${about}`)}>
        <Icon name="copy" className="size-3.5" label={`Copy the sentence of ${about}`} />
      </button>
      <button type="button" className={look} title="Copy the LaTeX row" aria-label={`Copy the LaTeX row of ${about}`} onClick={() => void copy(row, `the LaTeX row of ${about}`)}>
        <span aria-hidden className="font-serif text-[12px]/[16px] font-semibold">TeX</span>
      </button>
      {refused && <CopyByHand {...refused} onClose={forget} />}
    </span>
  );
}
