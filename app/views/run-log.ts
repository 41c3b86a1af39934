import type { RunView } from '@/lib/services/submissions/submission-view';

type Step = { readonly atMs: number; readonly doing: string };

const line = ({ atMs, doing }: Step): string => `${(atMs / 1000).toFixed(3).padStart(8)} s  ${doing}`;
const claimOf = (step: Step): string | null => /^([^\s:]+): /.exec(step.doing)?.[1] ?? null;

/** The log of each claim: what concerns it, and what concerns them all, such as reading the files. */
export function logsOf(run: RunView | null, claims: readonly { readonly id: string }[]): Readonly<Record<string, string>> {
  if (run?.state !== 'measured') return {};
  const ids = new Set(claims.map((claim) => claim.id));
  const concerns = (step: Step, id: string) => { const named = claimOf(step); return named === null || named === id || !ids.has(named); };
  return Object.fromEntries([...ids].map((id) => [id, run.log.filter((step) => concerns(step, id)).map(line).join('\n')]));
}
