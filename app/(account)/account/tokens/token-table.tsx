import type { TokenView } from '@/lib/services/tokens/token-view';
import { Table } from '@/app/_ui/primitives/table';
import { formatDay, formatInstant } from '@/app/views/dates';
import { RevokeButton } from './revoke-button';

const endOf = (token: TokenView): string => {
  if (token.state === 'revoked') return `revoked ${formatDay(token.revokedAt ?? token.createdAt)}`;
  return `${token.state === 'expired' ? 'expired' : 'expires'} ${formatDay(token.expiresAt)}`;
};

export function TokenTable({ tokens }: { readonly tokens: readonly TokenView[] }) {
  return (
    <Table caption="Your tokens, those in force first" className="min-w-[640px]">
      <thead>
        <tr><th scope="col">Name</th><th scope="col">Begins with</th><th scope="col">Scopes</th><th scope="col">Last use</th><th scope="col">End</th><th scope="col" className="relative"><span className="sr-only">Act</span></th></tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <tr key={token.id} className={token.state === 'live' ? undefined : 'text-ink-2'}>
            <th scope="row" className="[overflow-wrap:anywhere]">{token.name}</th>
            <td><code className="font-code text-code">{token.hint}…</code></td>
            <td>{token.scopes.join(', ')}</td>
            <td>{token.lastUsedAt ? formatInstant(token.lastUsedAt) : 'never'}</td>
            <td>{endOf(token)}</td>
            <td className="text-right">{token.state === 'live' && <RevokeButton id={token.id} name={token.name} />}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
