import { useId, type ReactNode } from 'react';
import { classes } from './classes';

/** What a control must carry so that its label, hint and error are heard with it. */
export interface FieldAria {
  readonly id: string;
  readonly 'aria-describedby'?: string;
  readonly 'aria-invalid'?: true;
}

interface FieldProps {
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  readonly error?: ReactNode;
  /** The label is read but not seen: only where the column head already says it. */
  readonly labelHidden?: boolean;
  readonly className?: string;
  /** A fixed id, where a link in an error list must reach this field. */
  readonly id?: string;
  readonly children: (aria: FieldAria) => ReactNode;
}

export function Field({ label, hint, error, labelHidden, className, id, children }: FieldProps) {
  const own = useId();
  const base = id ?? own;
  const hintId = hint ? `${base}-hint` : null;
  const errorId = error ? `${base}-error` : null;
  const described = [errorId, hintId].filter(Boolean).join(' ');
  return (
    <div className={classes('grid min-w-0 content-start grid-cols-[minmax(0,1fr)] gap-1 text-ui', className)}>
      <label htmlFor={base} className={labelHidden ? 'sr-only' : 'text-small font-semibold'}>{label}</label>
      {children({ id: base, ...(described ? { 'aria-describedby': described } : {}), ...(error ? { 'aria-invalid': true as const } : {}) })}
      {error && <FieldError id={errorId ?? undefined}>{error}</FieldError>}
      {hint && <p id={hintId ?? undefined} className="text-small text-ink-2">{hint}</p>}
    </div>
  );
}

export const FieldError = ({ id, children }: { readonly id?: string; readonly children: ReactNode }) => (
  <p id={id} className="text-small text-differs">{children}</p>
);
