import type { VerdictWord } from '@/lib/pipeline/result';
import type { SubmissionState } from '@/lib/policy/submission-state';
import { CHASE_BEFORE_DUE_DAYS, CHASE_INVITATION_AFTER_DAYS, CLOCK_DAYS, addDays, dayOf, reportDays } from './clocks';

/** The editor's queue, grouped by what is needed now. Order is the order on the page. */
export const QUEUE_GROUPS = ['assign', 'chase', 'decide', 'unsettled-runs', 'waiting'] as const;
export type QueueGroup = (typeof QUEUE_GROUPS)[number];

export const QUEUE_GROUP_WORDS: Readonly<Record<QueueGroup, string>> = {
  assign: 'Assign',
  chase: 'Chase',
  decide: 'Decide',
  'unsettled-runs': 'Unsettled runs',
  waiting: 'Nothing for you',
};

export interface QueueReferee {
  readonly slot: string;
  readonly state: 'asked' | 'accepted';
  readonly since: string;
  readonly hasReported: boolean;
}

export interface QueueFacts {
  readonly state: SubmissionState;
  readonly round: number;
  readonly stateSince: string;
  readonly editorName: string | null;
  readonly isYours: boolean;
  /** Those asked and not declined, lapsed or relieved. */
  readonly referees: readonly QueueReferee[];
  readonly verdicts: readonly { readonly claim: string; readonly verdict: VerdictWord }[];
  readonly run: 'none' | 'working' | 'finished' | 'stopped';
  readonly signing: 'not-needed' | 'waiting' | 'refused';
}

export type QueueStep = 'take' | 'assign' | 'send-to-review' | 'remind' | 'decide' | 'look' | 'open';

export interface QueuePlace {
  readonly group: QueueGroup;
  readonly ball: { readonly with: string; readonly since: string; readonly day: number; readonly of: number | null };
  readonly because: string;
  readonly next: QueueStep;
}

type Placer = (facts: QueueFacts, now: string) => QueuePlace;

const place = (now: string, group: QueueGroup, next: QueueStep, because: string, who: string, since: string, of: number | null): QueuePlace => ({
  group,
  ball: { with: who, since, day: dayOf(since, now), of },
  because,
  next,
});

const editor = (facts: QueueFacts): string => facts.editorName ?? 'no editor yet';
const accepted = (facts: QueueFacts): QueueReferee[] => facts.referees.filter((r) => r.state === 'accepted');
const names = (referees: readonly QueueReferee[]): string => {
  const slots = referees.map((r) => r.slot).sort();
  return `${slots.length === 1 ? 'Referee' : 'Referees'} ${slots.join(', ')}`;
};
const oldest = (referees: readonly QueueReferee[], otherwise: string): string =>
  referees.map((r) => r.since).sort()[0] ?? otherwise;
const later = (a: string, b: string): string => (Date.parse(a) > Date.parse(b) ? a : b);

/** A run that cannot carry a verdict comes before anything people could do. */
function unsettled(facts: QueueFacts, now: string): QueuePlace | undefined {
  const parted = facts.verdicts.filter((v) => v.verdict === 'routes-disagree').map((v) => v.claim);
  const look = (because: string, who: string) => place(now, 'unsettled-runs', 'look', because, who, facts.stateSince, 2);
  if (facts.signing === 'refused') return look('the signer refused', editor(facts));
  if (parted.length > 0) return look(`routes disagree on ${parted.join(', ')}`, 'Administrator');
  if (facts.run === 'stopped') return look('the run stopped', 'Administrator');
  return undefined;
}

const inTriage: Placer = (facts, now) => {
  if (facts.editorName === null) return place(now, 'assign', 'take', 'nobody has taken it', editor(facts), facts.stateSince, CLOCK_DAYS.triage);
  const asked = facts.referees.filter((r) => r.state === 'asked');
  if (accepted(facts).length > 0) return place(now, 'assign', 'send-to-review', `${names(accepted(facts))} ready`, editor(facts), facts.stateSince, CLOCK_DAYS.triage);
  if (asked.length === 0) return place(now, 'assign', 'assign', 'no referee asked', editor(facts), facts.stateSince, CLOCK_DAYS.triage);
  const since = oldest(asked, facts.stateSince);
  const silent = dayOf(since, now) > CHASE_INVITATION_AFTER_DAYS;
  const because = asked.length === 1 ? '1 invitation out' : `${asked.length} invitations out`;
  return place(now, silent ? 'chase' : 'waiting', silent ? 'remind' : 'open', because, names(asked), since, CLOCK_DAYS.invitation);
};

const inReview: Placer = (facts, now) => {
  const owing = accepted(facts).filter((r) => !r.hasReported);
  const in_ = accepted(facts).length - owing.length;
  const because = `${in_} of ${accepted(facts).length} ${accepted(facts).length === 1 ? 'report' : 'reports'}`;
  // A referee who joined late has the full time from the day of joining.
  const since = owing.length === 0 ? facts.stateSince : later(facts.stateSince, oldest(owing, facts.stateSince));
  const of = reportDays(facts.round);
  const chase = Date.parse(now) >= Date.parse(addDays(since, of - CHASE_BEFORE_DUE_DAYS));
  const who = owing.length === 0 ? editor(facts) : names(owing);
  return place(now, chase ? 'chase' : 'waiting', chase ? 'remind' : 'open', because, who, since, of);
};

const inDeciding: Placer = (facts, now) =>
  facts.signing === 'waiting'
    ? place(now, 'waiting', 'open', 'decided, being signed', 'Signer', facts.stateSince, CLOCK_DAYS.signing)
    : place(now, 'decide', 'decide', 'all reports are in', editor(facts), facts.stateSince, CLOCK_DAYS.decision);

const withAuthors: Placer = (facts, now) => {
  const over = dayOf(facts.stateSince, now) > CLOCK_DAYS.revision - CHASE_BEFORE_DUE_DAYS;
  return place(now, over ? 'chase' : 'waiting', 'open', 'revision asked', 'Authors', facts.stateSince, CLOCK_DAYS.revision);
};

const lodged: Placer = (facts, now) => place(now, 'waiting', 'open', 'being computed', 'Machine', facts.stateSince, CLOCK_DAYS.checking);

const PLACERS: Partial<Record<SubmissionState, Placer>> = {
  lodged,
  triage: inTriage,
  'in-review': inReview,
  deciding: inDeciding,
  'back-with-author': withAuthors,
  'on-hold': (facts, now) => place(now, 'waiting', 'open', 'on hold', editor(facts), facts.stateSince, null),
};

/** Where a submission stands in the queue; undefined when it is no editor's business (drafts, ended matters). */
export function placeInQueue(facts: QueueFacts, now: string): QueuePlace | undefined {
  const placer = PLACERS[facts.state];
  if (!placer) return undefined;
  return unsettled(facts, now) ?? placer(facts, now);
}
