export interface ProgressStep {
  readonly label: string;
  /** 0 to 1; null when under way without a measure. */
  readonly fraction: number | null;
}

const perCent = (fraction: number) => `${Math.floor(Math.min(1, Math.max(0, fraction)) * 100)} %`;

export function ProgressBar({ label, fraction }: ProgressStep) {
  return (
    <span
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      {...(fraction === null ? {} : { 'aria-valuenow': Math.floor(fraction * 100) })}
      className="block h-1.5 bg-hover shadow-[inset_0_0_0_1px_var(--hair-2)]"
    >
      <span className="block h-1.5 bg-waiting" style={{ width: fraction === null ? '0' : perCent(fraction).replace(' ', '') }} />
    </span>
  );
}

/** Long work, step by step. */
export function ProgressList({ steps, label = 'Progress' }: { readonly steps: readonly ProgressStep[]; readonly label?: string }) {
  return (
    <ul aria-label={label} className="grid gap-1.5 text-ui">
      {steps.map((step) => (
        <li key={step.label} className="grid min-h-8 grid-cols-[minmax(96px,150px)_1fr_76px] items-center gap-3">
          <span>{step.label}</span>
          <ProgressBar {...step} />
          <span className="text-right text-ink-2">{step.fraction === null ? 'under way' : perCent(step.fraction)}</span>
        </li>
      ))}
    </ul>
  );
}
