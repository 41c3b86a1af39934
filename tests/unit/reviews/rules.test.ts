import { describe, expect, it } from 'vitest';
import { SUBMISSION_ACTIONS } from '@/lib/policy/actions';
import { bylineFor, drawSlot, REFEREE_SLOTS, timeFor, type Viewer, type Writer } from '@/lib/reviews/anonymity';
import { findAnchoredNumber, reAnchor } from '@/lib/reviews/anchors';
import { findConflicts, isBarred, needsReason, type ConflictFacts } from '@/lib/reviews/conflicts';
import { agreesByTwoRoutes, coveredClaims, isSigned, openLevel, signingWords } from '@/lib/reviews/decision';
import { draftNumbers, draftPoints, type LetterThread } from '@/lib/reviews/letter';
import { mayClose, mayRead, stateAfterReply, THREAD_STATES } from '@/lib/reviews/threads';
import { follow, MOVES, type MoveFacts } from '@/lib/reviews/transitions';
import { claim, point, result, swept } from '../../support/result-documents';

const facts = (over: Partial<MoveFacts> = {}): MoveFacts => ({ accepted: 0, reported: 0, decision: null, hasSignedRecord: false, ...over });

describe('moves of a submission', () => {
  it.each([
    ['send-to-review', 'triage', {}, 'reviews/no-referee'],
    ['send-to-review', 'triage', { accepted: 1 }, 'in-review'],
    ['send-to-review', 'deciding', { accepted: 1 }, 'reviews/no-such-move'],
    ['all-reports-in', 'in-review', { accepted: 2, reported: 1 }, 'reviews/reports-out'],
    ['all-reports-in', 'in-review', { accepted: 0, reported: 0 }, 'reviews/reports-out'],
    ['all-reports-in', 'in-review', { accepted: 2, reported: 2 }, 'deciding'],
    ['begin-deciding', 'in-review', { accepted: 2 }, 'reviews/no-report'],
    ['begin-deciding', 'in-review', { accepted: 2, reported: 1 }, 'deciding'],
    ['send-back', 'deciding', { decision: 'back-with-author' }, 'back-with-author'],
    ['send-back', 'deciding', { decision: 'enter' }, 'reviews/no-decision'],
    ['enter', 'deciding', { decision: 'enter' }, 'reviews/not-signed'],
    ['enter', 'deciding', { decision: 'enter', hasSignedRecord: true }, 'entered'],
  ] as const)('%s from %s with %j: %s', (move, from, over, outcome) => {
    const to = follow(move, from, facts(over));
    expect(to.ok ? to.value : to.error.code).toBe(outcome);
  });

  it('policy lets an editor act in every state from which an editor can move', () => {
    const open = new Set<string>(Object.entries(SUBMISSION_ACTIONS).filter(([name]) => name.startsWith('review.')).flatMap(([, rule]) => ('editor' in rule ? [...rule.editor] : [])));
    expect(MOVES.filter((m) => m.by === 'editor' && !open.has(m.from)).map((m) => m.name)).toEqual([]);
  });

  it('nobody but the signer enters', () => expect(MOVES.filter((m) => m.to === 'entered').map((m) => m.by)).toEqual(['signer']));
});

describe('conflicts of interest', () => {
  const person = { userId: 'u1', name: 'T. Marrable', email: 't.marrable@larkfield.example' };
  const of = (over: Partial<ConflictFacts> = {}): ConflictFacts => ({ candidate: { userId: 'u2', email: 's.vasterling@saltern.example' }, people: [person], sharedWork: [], sameQuantity: [], ...over });

  it('a stranger has none', () => expect(findConflicts(of())).toEqual([]));
  it('an author may not referee, by account or by address in any case', () => {
    expect(isBarred(findConflicts(of({ candidate: { userId: 'u1', email: 'x@elsewhere.example' } })))).toBe(true);
    expect(isBarred(findConflicts(of({ candidate: { userId: 'u9', email: 'T.Marrable@Larkfield.example' } })))).toBe(true);
  });
  it('the same mail domain asks for a reason, a longer name that ends like it does not', () => {
    const flags = findConflicts(of({ candidate: { userId: 'u2', email: 'q@LARKFIELD.example' } }));
    expect(flags).toMatchObject([{ code: 'same-mail-domain', level: 'ask', text: 'Same mail domain (larkfield.example) as T. Marrable' }]);
    expect(needsReason(flags)).toBe(true);
    expect(findConflicts(of({ candidate: { userId: 'u2', email: 'q@notlarkfield.example' } }))).toEqual([]);
  });
  it('shared work asks, the same quantity is noted once', () => {
    const flags = findConflicts(of({ sharedWork: [{ name: 'T. Marrable', months: 31 }], sameQuantity: [{ quantity: 'snr' }, { quantity: 'snr' }] }));
    expect(flags.map((f) => [f.level, f.code])).toEqual([['ask', 'shared-work'], ['note', 'same-quantity']]);
  });
});

describe('the anonymity line', () => {
  const referee: Writer = { userId: 'r', name: 'S. Vasterling', side: 'referee', slot: 'C' };
  const author: Writer = { userId: 'a', name: 'T. Marrable', side: 'authors', slot: null };
  const editor: Writer = { userId: 'e', name: 'R. Amsel', side: 'editor', slot: null };
  const at = '2026-11-24T14:02:33.123Z';
  const as = (w: Writer): Viewer => ({ userId: w.userId, side: w.side });

  it.each([
    ['an author', { userId: 'a', side: 'authors' }, 'Referee C', 'day'],
    ['another referee', { userId: 'r2', side: 'referee' }, 'Referee C', 'day'],
    ['a reader', { userId: '', side: 'authors' }, 'Referee C', 'day'],
    ['the editor', as(editor), 'S. Vasterling', 'instant'],
    ['the referee', as(referee), 'Referee C', 'instant'],
  ] as const)('%s sees a referee as they may', (_who, viewer, by, precision) => {
    expect(bylineFor(referee, viewer).by).toBe(by);
    expect(timeFor(at, referee, viewer).precision).toBe(precision);
  });

  it('a day is all that is left of a time across the line, and no view carries an account id', () => {
    expect(timeFor(at, referee, as(author))).toEqual({ precision: 'day', on: '2026-11-24' });
    expect(timeFor(at, author, as(referee))).toEqual({ precision: 'day', on: '2026-11-24' });
    expect(timeFor(at, author, as(editor))).toEqual({ precision: 'instant', at });
    expect(Object.values(bylineFor(referee, as(author)))).not.toContain('r');
  });

  it('a referee without a letter is never shown by name', () => expect(() => bylineFor({ ...referee, slot: null }, as(author))).toThrow());

  it('letters are drawn at random from those that are free, until there are none', () => {
    expect(drawSlot(['A', 'C'], () => 0)).toBe('B');
    expect(drawSlot(['A'], (n) => n - 1)).toBe('H');
    expect(drawSlot(REFEREE_SLOTS, () => 0)).toBeUndefined();
  });
});

describe('threads', () => {
  const base = { state: 'open', side: 'referee', isOpener: true, openedOnRevision: 1, revision: 1 } as const;

  it('authors answer, the other side asks again, and what is closed stays closed', () => {
    expect(stateAfterReply('open', 'authors')).toBe('answered');
    expect(stateAfterReply('answered', 'referee')).toBe('open');
    expect(THREAD_STATES.filter((s) => s !== 'open' && s !== 'answered').map((s) => stateAfterReply(s, 'referee'))).toEqual(['resolved', 'overruled', 'moot']);
  });

  it('only the opener or the editor closes, only the editor overrules, moot needs a revision', () => {
    expect(mayClose('resolved', base)).toBe(true);
    expect(mayClose('resolved', { ...base, isOpener: false })).toBe(false);
    expect(mayClose('overruled', base)).toBe(false);
    expect(mayClose('overruled', { ...base, side: 'editor', isOpener: false })).toBe(true);
    expect(mayClose('moot', base)).toBe(false);
    expect(mayClose('moot', { ...base, revision: 2 })).toBe(true);
    expect(mayClose('resolved', { ...base, state: 'moot' })).toBe(false);
  });

  it.each([
    ['editor-only', { authors: false, referee: false, editor: true }],
    ['referees', { authors: false, referee: true, editor: true }],
    ['authors', { authors: true, referee: true, editor: true }],
  ] as const)('a thread for %s is read by %j', (visibility, expected) => {
    expect({ authors: mayRead(visibility, 'authors', false), referee: mayRead(visibility, 'referee', false), editor: mayRead(visibility, 'editor', false) }).toEqual(expected);
  });
});

describe('anchors after a revision', () => {
  const was = { printed: '0.9889', value: 0.9185 };
  const anchor = { claim: 'C1', at: { totalMassMsun: 60 } };

  it('same, changed from old to new, or lost', () => {
    expect(reAnchor(anchor, was, result(swept({ 60: 0.9185, 100: 0.9889 })))).toEqual({ standing: 'same' });
    expect(reAnchor(anchor, was, result(swept({ 60: 0.9753 })))).toEqual({ standing: 'changed', was, now: { printed: '0.9889', value: 0.9753, expandedUncertainty: 2e-7, unit: '' } });
    expect(reAnchor(anchor, was, result(swept({ 100: 0.9889 })))).toEqual({ standing: 'lost', was });
    expect(reAnchor({ claim: 'C7', at: null }, was, result())).toEqual({ standing: 'lost', was });
  });

  it('a place is found through the last digits of decimal text, and no further', () => {
    const third = result(claim({ points: [point({ at: { totalMassMsun: 0.1 + 0.2 } }), point({ at: { totalMassMsun: 1 } })] }));
    expect(findAnchoredNumber(third, { claim: 'C1', at: { totalMassMsun: 0.3 } })?.value).toBe(0.98894);
    expect(findAnchoredNumber(third, { claim: 'C1', at: { totalMassMsun: 0.3001 } })).toBeUndefined();
    expect(findAnchoredNumber(third, { claim: 'C1', at: { fLowHz: 0.3 } })).toBeUndefined();
    expect(findAnchoredNumber(third, { claim: 'C1', at: null })).toEqual({ printed: null, value: null });
  });

  it('a number that was not computable and now is has changed', () => {
    expect(reAnchor({ claim: 'C1', at: null }, { printed: '0.9889', value: null }, result())).toMatchObject({ standing: 'changed', now: { value: 0.98894 } });
  });
});

describe('levels', () => {
  it('agreement by two routes is asked of the numbers, not of the word', () => {
    expect(agreesByTwoRoutes(claim())).toBe(true);
    expect(agreesByTwoRoutes(claim({ routeB: [] }))).toBe(false);
    expect(agreesByTwoRoutes(claim({ points: [point({ routes: { A: 0.98894, B: 0.9891 } })] }))).toBe(false);
    expect(agreesByTwoRoutes(claim({ points: [point({ routes: { A: 0.98894, B: null } })] }))).toBe(false);
    expect(agreesByTwoRoutes(claim({ points: [point({ expandedUncertainty: NaN })] }))).toBe(false);
    expect(agreesByTwoRoutes(claim({ verdict: 'unsettled' }))).toBe(false);
    expect(agreesByTwoRoutes(claim({ points: [point(), point({ verdict: 'differs' })] }))).toBe(false);
    // Ten points and more: route B runs at some of them, and has to meet A there.
    expect(agreesByTwoRoutes(claim({ points: [point(), point({ routes: { A: 0.98894, B: null } })], routeB: [0] }))).toBe(true);
  });

  it('a level covers what agrees; the second only what is covered', () => {
    const mixed = result(claim(), claim({ id: 'C2', coverage: { state: 'covered' } }), claim({ id: 'C3', verdict: 'differs', points: [point({ verdict: 'differs' })] }));
    expect(coveredClaims(mixed, 1)).toEqual(['C1', 'C2']);
    expect(coveredClaims(mixed, 2)).toEqual(['C2']);
  });

  it.each([
    [1, 0, ['reviews/too-few-reports']],
    [1, 1, []],
    [2, 1, ['reviews/not-covered', 'reviews/too-few-reports']],
    [3, 2, ['reviews/not-covered', 'reviews/scope-not-examined']],
  ] as const)('level %i with %i reports: %j', (level, reports, codes) => {
    const opened = openLevel(level, { result: result(), reports });
    expect(opened.ok ? [] : opened.error.map((r) => r.code)).toEqual(codes);
  });

  it('without a run, or when nothing agrees, no level is open', () => {
    expect(openLevel(1, { result: null, reports: 3 }).ok).toBe(false);
    expect(openLevel(1, { result: result(claim({ verdict: 'differs' })), reports: 3 }).ok).toBe(false);
  });

  it('a signature is the first three words, and never nothing', () => {
    expect(signingWords('Four per cent of the mass radiated')).toBe('Four per cent');
    expect(isSigned('Four per cent of the mass radiated', '  four  per cent ')).toBe(true);
    expect(isSigned('Four per cent of the mass radiated', 'Four per')).toBe(false);
    expect(isSigned('', '')).toBe(false);
  });
});

describe('the machine drafts numbers and points, never prose', () => {
  const thread = (over: Partial<LetterThread>): LetterThread => ({ id: 't', kind: 'must-change', state: 'open', visibility: 'authors', anchor: { claim: 'C1', at: null }, opening: 'Say so.', ...over });

  it('must before should, open ones alone, and nothing that authors may not read', () => {
    const points = draftPoints([
      thread({ id: 's', kind: 'should-change', state: 'answered' }),
      thread({ id: 'm' }),
      thread({ id: 'q', kind: 'question' }),
      thread({ id: 'r', state: 'resolved' }),
      thread({ id: 'secret', visibility: 'referees' }),
      thread({ id: 'private', visibility: 'editor-only' }),
    ]);
    expect(points.map((p) => p.threadId)).toEqual(['m', 's']);
  });

  it('each point of each claim is a row', () => {
    expect(draftNumbers(result(swept({ 60: 0.9, 100: 0.95 }))).map((n) => [n.claim, n.at, n.recomputed])).toEqual([['C1', { totalMassMsun: 60 }, 0.9], ['C1', { totalMassMsun: 100 }, 0.95]]);
  });
});
