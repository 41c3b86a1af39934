import type { Metadata } from 'next';
import Link from 'next/link';
import { isOrcidConfigured } from '@/lib/auth/orcid';
import { webEnv } from '@/lib/env';
import { loadOwn, loadSessionId } from '@/lib/http/page-guard';
import { LACK_PAGES, LACK_SENTENCES } from '@/lib/policy/lack';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { listOwnSessions } from '@/lib/services/accounts/own-sessions';
import { Facts } from '@/app/_ui/primitives/facts';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { providerSentence } from '../provider-words';
import { Group } from './group';
import { LettersForm } from './letters-form';
import { ProfileForm } from './profile-form';
import { SessionTable } from './session-table';
import { OrcidPart, PasswordPart } from './ways-in';

export const metadata: Metadata = { title: 'Account' };

const roleWords = { member: 'member', editor: 'editor', administrator: 'administrator' } as const;

interface AccountProps {
  readonly searchParams: Promise<{ readonly error?: string | string[]; readonly linked?: string | string[] }>;
}

export default async function Account({ searchParams }: AccountProps) {
  const { error, linked } = await searchParams;
  const account = await loadOwn('/account', getOwnAccount);
  const current = await loadSessionId();
  const sessions = await loadOwn('/account', (actor) => listOwnSessions(actor, current));
  const problem = providerSentence(error);
  return (
    <div className="wrap pt-10">
      <div className="mx-auto grid max-w-[980px] gap-10">
        <h1>Account</h1>
        {account.lacks && <Notice kind="ask" word="Reading only" actions={<LinkButton href={LACK_PAGES[account.lacks]} tone="main">Add it</LinkButton>}>{LACK_SENTENCES[account.lacks]}</Notice>}
        {problem && <Notice kind="stop" word="Not yet" live="alert">{problem}</Notice>}
        {linked === 'orcid' && account.orcid && <Notice kind="done" live="status">ORCID is linked. You can sign in with it from now on.</Notice>}
        <Group id="you" title="You" hint="Shown on records you author.">
          <div className="grid gap-5">
            <Facts facts={[['E-mail', account.email ?? 'none yet'], ['Account', roleWords[account.role]]]} />
            <ProfileForm account={account} />
          </div>
        </Group>
        <Group id="orcid" title="ORCID" hint="A way in, and proof of an iD beside your name.">
          <OrcidPart account={account} configured={isOrcidConfigured(webEnv())} />
        </Group>
        <Group id="password" title="Password" hint="Setting a new one signs you out everywhere else.">
          <PasswordPart hasPassword={account.hasPassword} />
        </Group>
        <Group id="second-factor" title="Second factor" hint="Editors and administrators always have one. Others may.">
          <p className="text-ui">{account.secondFactor ? 'On: signing in asks for a code of your authenticator.' : 'Off: a password or ORCID alone signs you in.'} <Link href="/account/second-factor" className="inline-flex min-h-8 items-center">{account.secondFactor ? 'Recovery codes, and switching it off' : 'Set one up'}</Link></p>
        </Group>
        <Group id="tokens" title="Tokens" hint="For scripts that act for you at the interface.">
          <p className="text-ui"><Link href="/account/tokens" className="inline-flex min-h-8 items-center">Your tokens, their scopes and their last use</Link></p>
        </Group>
        <Group id="sessions" title="Sessions" hint="Each ends by itself after 12 hours without use, and after 7 days in any case.">
          <SessionTable sessions={sessions} />
        </Group>
        <Group id="letters" title="Letters" hint="Each is sent when its cause comes up; there is no digest.">
          <LettersForm declined={account.declinedLetters} />
        </Group>
        <Group id="data" title="Your data" hint="All that this account holds and you wrote.">
          <p className="mb-2 max-w-measure text-ui">One JSON document: account, sessions, tokens without their secrets, your submissions with their sheets, and the reports and comments you wrote. Nobody else’s name is in it. Files are told by their digests.</p>
          <LinkButton href="/account/export" download>Export my data</LinkButton>
        </Group>
      </div>
    </div>
  );
}
