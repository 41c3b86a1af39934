import type { CheckView, RunView } from '@/lib/services/submissions/submission-view';
import { formatInstant } from './dates';

const startedOf = ({ requestedAt }: RunView): string => formatInstant(requestedAt);

/** A check that has no numbers, in front of those of the check before it; null where the latest has its own. */
export function laterCheckWords({ run, stoppedBy, before }: Pick<CheckView, 'run' | 'stoppedBy' | 'before'>): string | null {
  if (before === null) return null;
  return `${checkWords(run, stoppedBy)} The numbers are those of the check before it, ${formatInstant(before.run.finishedAt)}${before.current ? '' : ', of an earlier save'}.`;
}

function checkWords(run: RunView, stoppedBy: string | null): string {
  switch (run.state) {
    case 'stopped': return stoppedBy === null ? `A later check broke off three times on our side, ${formatInstant(run.stoppedAt)}; the administrator has been told.` : `A later check was stopped by ${stoppedBy}, ${formatInstant(run.stoppedAt)}, before it had numbers.`;
    case 'refused': return `A later check, ${formatInstant(run.finishedAt)}, could not read the sheet or a file; what is to mend is listed with it.`;
    default: return `A later check, asked for ${startedOf(run)}, is under way.`;
  }
}

/** The same of official runs: a newer engine was to measure a revision again. */
export function laterRunWords(run: RunView | null, later: RunView | null): string | null {
  if (run === null || later === null) return null;
  return `${officialWords(later)} The numbers of engine ${run.engine} stand.`;
}

function officialWords(later: RunView): string {
  const which = `A later official run, with engine ${later.engine},`;
  switch (later.state) {
    case 'stopped': return `${which} broke off three times on our side, ${formatInstant(later.stoppedAt)}; the administrator has been told and can ask for it again.`;
    case 'refused': return `${which} could not read the sheet or a file, ${formatInstant(later.finishedAt)}; the administrator can look into it and ask for it again.`;
    default: return `${which} asked for ${startedOf(later)}, is under way.`;
  }
}
