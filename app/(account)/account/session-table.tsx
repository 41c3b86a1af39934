'use client';
import { ActButton } from '@/app/(desk)/act-parts';
import { Table } from '@/app/_ui/primitives/table';
import { Tag } from '@/app/_ui/primitives/tag';
import { formatInstant } from '@/app/views/dates';
import type { SessionView } from '@/lib/services/accounts/own-sessions';
import { endOtherSessions, endSession } from './actions';
import { SignOutButton } from './sign-out-button';

export function SessionTable({ sessions }: { readonly sessions: readonly SessionView[] }) {
  return (
    <div className="grid gap-4">
      <Table caption="Sessions">
        <thead><tr><th scope="col">Browser</th><th scope="col">Began</th><th scope="col">Last seen</th><th scope="col"><span className="sr-only">Next step</span></th></tr></thead>
        <tbody>
          {sessions.map((session) => (
            <tr key={session.id}>
              <th scope="row">{session.device} {session.current && <Tag>this one</Tag>}</th>
              <td>{formatInstant(session.startedAt)}</td>
              <td>{formatInstant(session.lastSeenAt)}</td>
              <td className="text-right">
                {!session.current && <ActButton act={endSession} input={{ id: session.id }} busy="Ending it" size="low" tone="quiet">End<span className="sr-only"> the session of {session.device} that began {formatInstant(session.startedAt)}</span></ActButton>}
              </td>
            </tr>
          ))}
        </tbody>
      </Table>
      <div className="flex flex-wrap items-start gap-2">
        <SignOutButton />
        {sessions.length > 1 && <ActButton act={endOtherSessions} input={{}} busy="Ending them">End all others</ActButton>}
      </div>
    </div>
  );
}
