import { describe, expect, it } from 'vitest';
import { ACCOUNT_ACTIONS, SUBMISSION_ACTIONS, type AccountAction, type SubmissionAction } from '@/lib/policy/actions';
import { VISITOR, type Actor } from '@/lib/policy/actor';
import type { AccountRole } from '@/lib/policy/account-role';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { beyondScope, may, mayGenerally } from '@/lib/policy/grant';
import { LACK_SENTENCES } from '@/lib/policy/lack';
import { SUBMISSION_STATES } from '@/lib/policy/submission-state';
import { TOKEN_SCOPES, type TokenScope } from '@/lib/policy/token-scopes';

/** Everybody who could ask: a kind of account and a part in the submission. */
const member = (accountRole: AccountRole): Actor => ({ kind: 'member', userId: 'u', name: 'U', accountRole });
const token = (name: string, ...scopes: TokenScope[]): Actor => ({ kind: 'token', userId: 'u', name, accountRole: 'member', tokenId: 't', scopes });
const WHO: Readonly<Record<string, { actor: Actor; part: Partial<SubmissionFacts> }>> = {
  author: { actor: member('member'), part: { authorship: 'author' } },
  'co-author': { actor: member('member'), part: { authorship: 'co-author' } },
  referee: { actor: member('member'), part: { referee: 'accepted' } },
  invited: { actor: member('member'), part: { referee: 'invited' } },
  editor: { actor: member('editor'), part: {} },
  'editor who is author': { actor: member('editor'), part: { authorship: 'author' } },
  'editor who is referee': { actor: member('editor'), part: { referee: 'accepted' } },
  'editor barred': { actor: member('editor'), part: { barred: true } },
  'editor, one factor': { actor: { ...member('editor'), lacks: 'second-factor' } as Actor, part: {} },
  'author, no address': { actor: { ...member('member'), lacks: 'confirmed-address' } as Actor, part: { authorship: 'author' } },
  administrator: { actor: member('administrator'), part: {} },
  stranger: { actor: member('member'), part: {} },
  visitor: { actor: VISITOR, part: {} },
  worker: { actor: { kind: 'worker', name: 'worker' }, part: {} },
};

const neverLodged = ['draft', 'checking'];
const factsIn = (state: SubmissionFacts['state'], part: Partial<SubmissionFacts>): SubmissionFacts => ({
  submissionId: 's', state, round: 1, everLodged: !neverLodged.includes(state), currentLodged: !neverLodged.includes(state), authorship: null, referee: null, barred: false, ...part,
});

const SIGN = { 'signed-out': 's', 'not-found': '.', denied: 'd', conflict: 'c' } as const;
const cell = (action: SubmissionAction, who: string, state: SubmissionFacts['state']): string => {
  const { actor, part } = WHO[who] ?? { actor: VISITOR, part: {} };
  const asked = may(action, actor, factsIn(state, part));
  if (asked.ok) return 'Y';
  return Object.values(LACK_SENTENCES).includes(asked.error.sentence) ? 'l' : SIGN[asked.error.code];
};

function printMatrix(): string {
  const short = SUBMISSION_STATES.map((s) => s.slice(0, 6).padEnd(7)).join('');
  const lines = ['Y may   c another state   d another part   . not found   s signed out   l lacks an address or a second factor', ''];
  for (const action of Object.keys(SUBMISSION_ACTIONS) as SubmissionAction[]) {
    lines.push(action.padEnd(24) + short);
    for (const who of Object.keys(WHO)) lines.push(`  ${who}`.padEnd(24) + SUBMISSION_STATES.map((state) => cell(action, who, state).padEnd(7)).join('').trimEnd());
    lines.push('');
  }
  lines.push('without a submission    visitor  member  editor  administrator');
  for (const action of Object.keys(ACCOUNT_ACTIONS) as AccountAction[]) {
    const cells = [VISITOR, member('member'), member('editor'), member('administrator')].map((actor) => (mayGenerally(action, actor).ok ? 'Y' : '.'));
    lines.push(`  ${action}`.padEnd(24) + `${cells[0]}        ${cells[1]}       ${cells[2]}       ${cells[3]}`);
  }
  lines.push('', `a token made for        ${TOKEN_SCOPES.map((scope) => scope.padEnd(8)).join('')}`.trimEnd());
  for (const action of [...Object.keys(SUBMISSION_ACTIONS), ...Object.keys(ACCOUNT_ACTIONS)] as (SubmissionAction | AccountAction)[])
    lines.push(`  ${action}`.padEnd(32) + TOKEN_SCOPES.map((scope) => (beyondScope(action, token('member', scope)) ? '.' : 'Y').padEnd(8)).join('').trimEnd());
  return `${lines.join('\n')}\n`;
}

describe('the matrix of actor, action and state', () => {
  it('is what people have read and agreed to', async () => {
    await expect(printMatrix()).toMatchFileSnapshot('./matrix.txt');
  });

  it('shows a draft to its authors alone', () => {
    for (const who of Object.keys(WHO).filter((w) => !w.includes('author')))
      for (const action of Object.keys(SUBMISSION_ACTIONS) as SubmissionAction[])
        if (who !== 'worker') expect(cell(action, who, 'draft'), `${who} ${action}`).toMatch(/[.sl]/);
  });

  it('opens to an account that lacks its address or second factor nothing that is shut to a visitor', () => {
    for (const who of ['editor, one factor', 'author, no address'])
      for (const action of Object.keys(SUBMISSION_ACTIONS) as SubmissionAction[])
        for (const state of SUBMISSION_STATES) if (cell(action, 'visitor', state) !== 'Y') expect(cell(action, who, state), `${who} ${action} ${state}`).toBe('l');
    const held = { ...member('administrator'), lacks: 'second-factor' } as Actor;
    for (const action of Object.keys(ACCOUNT_ACTIONS) as AccountAction[])
      expect(mayGenerally(action, held).ok, action).toBe(action.startsWith('account.') || mayGenerally(action, VISITOR).ok);
    expect(may('review.enter', held, null)).toEqual(may('review.enter', held, factsIn('deciding', {})));
  });

  it('lets nobody but the machine do what only a machine does', () => {
    for (const action of ['run.finish-check', 'run.finish-official', 'run.finish-variation'] as const)
      for (const who of Object.keys(WHO).filter((w) => w !== 'worker')) for (const state of SUBMISSION_STATES) expect(cell(action, who, state)).not.toBe('Y');
  });

  it('lets nobody judge their own work, nor an editor with a part in it act as its editor', () => {
    for (const action of ['review.enter', 'review.send-back', 'review.set-aside', 'review.invite', 'review.see-identities', 'review.report'] as const)
      for (const who of ['author', 'co-author', 'editor who is author', 'editor barred']) for (const state of SUBMISSION_STATES) expect(cell(action, who, state), `${who} ${action} ${state}`).not.toBe('Y');
    for (const state of SUBMISSION_STATES) expect(cell('review.enter', 'editor who is referee', state)).not.toBe('Y');
  });

  it('answers a stranger alike whether a submission under review exists or not', () => {
    for (const action of Object.keys(SUBMISSION_ACTIONS) as SubmissionAction[])
      for (const actor of [member('member'), VISITOR]) expect(may(action, actor, factsIn('in-review', {}))).toEqual(may(action, actor, null));
  });

  it('gives a grant that names the states to assert again, and that cannot be altered', () => {
    const granted = may('submission.lodge', member('member'), factsIn('draft', { authorship: 'author' }));
    if (!granted.ok) throw new Error('the author may lodge');
    expect(granted.value.states).toEqual(['draft', 'back-with-author']);
    expect(() => Object.assign(granted.value, { action: 'review.enter' })).toThrow();
  });

  it('lets a token do nothing without its scope, in the same words whether or not the submission exists', () => {
    for (const action of Object.keys(SUBMISSION_ACTIONS) as SubmissionAction[])
      for (const scope of TOKEN_SCOPES) {
        const refused = beyondScope(action, token('T', scope));
        if (!refused) continue;
        expect(may(action, token('T', scope), factsIn('draft', { authorship: 'author' }))).toEqual({ ok: false, error: refused });
        expect(may(action, token('T', scope), null)).toEqual({ ok: false, error: refused });
      }
  });

  it('lets no token act as editor or administrator, nor make tokens or declare anything in its owner’s name', () => {
    const all = token('T', ...TOKEN_SCOPES);
    for (const action of ['review.take', 'review.invite', 'review.enter', 'review.send-back', 'review.set-aside', 'review.see-identities', 'review.begin', 'review.hold', 'record.strike', 'review.answer-invitation', 'submission.confirm-authorship', 'submission.manage-people'] as const)
      for (const part of [{}, { authorship: 'author' }, { referee: 'invited' }] as const) for (const state of SUBMISSION_STATES) expect(may(action, all, factsIn(state, part)).ok, `${action} ${state}`).toBe(false);
    for (const action of ['account.manage-tokens', 'account.read-own', 'queue.read', 'admin.read-jobs', 'admin.manage-people'] as const) expect(mayGenerally(action, all).ok, action).toBe(false);
  });
});
