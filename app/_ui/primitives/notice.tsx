import type { ReactNode } from 'react';
import { classes } from './classes';

export type NoticeKind = 'stop' | 'ask' | 'look' | 'note' | 'done';
const words: Record<NoticeKind, string> = { stop: 'Stops', ask: 'Needs an answer', look: 'Worth a look', note: 'Note', done: 'Done' };

interface NoticeProps {
  readonly kind: NoticeKind;
  /** The word beside the edge; the kind's own word unless given. */
  readonly word?: string;
  /** Buttons or links: each a next step. */
  readonly actions?: ReactNode;
  /** `alert` for what came of the reader's own act, `status` for what came by itself. */
  readonly live?: 'alert' | 'status';
  readonly id?: string;
  readonly children: ReactNode;
}

/** Something that must be kept in sight: a coloured edge and a word, never colour alone. */
export function Notice({ kind, word, actions, live, id, children }: NoticeProps) {
  return (
    <div id={id} role={live} className={classes('edge grid gap-x-4 gap-y-0.5 rounded border border-hair-2 bg-sheet py-3 pr-4 pl-4 text-ui sm:grid-cols-[118px_minmax(0,1fr)]', `edge-${kind}`)}>
      <span className="font-semibold text-[color:var(--edge-word)]">{word ?? words[kind]}</span>
      <div className="min-w-0 max-w-[74ch]">
        {children}
        {actions && <div className="mt-2 flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}

/** The list at the head of a form that was not accepted; each entry leads to its field. */
export function ErrorSummary({ title, problems }: { readonly title: string; readonly problems: readonly { readonly fieldId?: string; readonly text: string }[] }) {
  return (
    <Notice kind="stop" live="alert" word="Not yet">
      <p className="font-semibold">{title}</p>
      <ul className="mt-1 grid gap-1">
        {problems.map((p) => <li key={`${p.fieldId ?? ''}${p.text}`}>{p.fieldId ? <a href={`#${p.fieldId}`}>{p.text}</a> : p.text}</li>)}
      </ul>
    </Notice>
  );
}
