import type { Metadata } from 'next';
import Link from 'next/link';
import { loadFor } from '@/lib/http/page-guard';
import { SCOPE_MEANINGS, TOKEN_SCOPES } from '@/lib/policy/token-scopes';
import { listTokens } from '@/lib/services/tokens/list-tokens';
import { TOKEN_DAYS } from '@/lib/services/tokens/token-input';
import { NewToken } from './new-token';
import { TokenTable } from './token-table';

export const metadata: Metadata = { title: 'Tokens' };

export default async function Tokens() {
  const tokens = await loadFor('/account/tokens', listTokens);
  return (
    <div className="wrap pt-10">
      <div className="mx-auto grid max-w-[980px] grid-cols-[minmax(0,1fr)] gap-8">
        <div>
          <p className="mb-2 flex items-center gap-2.5 text-ui text-ink-2"><Link href="/account" className="inline-flex min-h-8 items-center">Account</Link><span aria-hidden>/</span><span>tokens</span></p>
          <h1>Tokens</h1>
          <p className="mt-3 max-w-measure text-ink-2">A token lets a script act for you at the <Link href="/interface">interface</Link>, within the scopes you give it and until it expires. It never does what an editor or an administrator does, and it makes no other tokens.</p>
        </div>
        <NewToken scopes={TOKEN_SCOPES.map((scope) => ({ scope, meaning: SCOPE_MEANINGS[scope] }))} days={TOKEN_DAYS} />
        <section aria-labelledby="yours-h">
          <h2 id="yours-h" className="mb-3">Your tokens</h2>
          {tokens.length === 0 ? <p className="text-ui text-ink-2">You have no token. Make one above; it is listed here with its last use.</p> : <TokenTable tokens={tokens} />}
        </section>
      </div>
    </div>
  );
}
