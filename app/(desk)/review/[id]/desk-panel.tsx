import { Card } from '@/app/_ui/primitives/card';
import { Facts } from '@/app/_ui/primitives/facts';
import { Tag } from '@/app/_ui/primitives/tag';
import { formatDay, formatInstant } from '@/app/views/dates';
import type { ConflictFlag } from '@/lib/reviews/conflicts';
import type { DeskView } from '@/lib/services/reviews/desk-view';
import type { InvitationView, RefereeCandidateView } from '@/lib/services/reviews/invitation-view';
import { ActButton } from '../../act-parts';
import { beginDeciding, sendToReview, takeTriage, withdrawInvitation } from '../actions';
import { InviteForm } from './invite-form';
import { NoteForm } from './note-form';

/** What stands beside the numbers on the desk: the editor's next steps, referees, notes. */
export function DeskPanel({ desk, candidates }: { readonly desk: DeskView; readonly candidates: readonly RefereeCandidateView[] }) {
  return (
    <>
      <NextStep desk={desk} />
      {desk.invitations && <Referees desk={desk} candidates={candidates} />}
      {desk.report && <Card title="Your report"><p className="text-ui">{desk.report.handedIn ? 'Handed in for this round.' : desk.report.due ? `Due ${formatDay(desk.report.due)}.` : 'The clock starts when the review begins.'}</p></Card>}
      {(desk.may.noteToEditor || desk.notes.length > 0) && <EditorNotes desk={desk} />}
    </>
  );
}

function NextStep({ desk }: { readonly desk: DeskView }) {
  const { may, submissionId: id } = desk;
  if (!may.takeTriage && !may.sendToReview && !may.beginDeciding) return null;
  return (
    <Card title="Next step">
      <div className="grid justify-items-start gap-2">
        {may.takeTriage && <ActButton act={takeTriage} input={{ id }} busy="Taking it" tone="main">Take this submission</ActButton>}
        {may.sendToReview && <ActButton act={sendToReview} input={{ id }} busy="Sending">Send to review</ActButton>}
        {may.beginDeciding && <ActButton act={beginDeciding} input={{ id }} busy="Calling">Decide with the reports at hand</ActButton>}
      </div>
    </Card>
  );
}

export const Flags = ({ flags }: { readonly flags: readonly ConflictFlag[] }) => (
  <ul className="grid gap-0.5 text-small">
    {flags.map((flag) => <li key={flag.code}><strong>{flag.level}</strong>: {flag.text}</li>)}
  </ul>
);

const stateWords: Record<InvitationView['state'], string> = { asked: 'asked, no answer yet', accepted: 'accepted', declined: 'declined', lapsed: 'lapsed', relieved: 'relieved' };

function Referees({ desk, candidates }: { readonly desk: DeskView; readonly candidates: readonly RefereeCandidateView[] }) {
  const invitations = desk.invitations ?? [];
  return (
    <Card title="Referees" aside="names are yours alone">
      <div className="grid gap-4">
        {invitations.length === 0 && <p className="text-ui text-ink-2">Nobody has been asked.</p>}
        {invitations.map((invitation) => (
          <div key={invitation.id} className="grid gap-1 border-t border-hair-2 pt-3">
            <p><strong>{invitation.name}</strong> <Tag>Referee {invitation.slot}</Tag></p>
            <Facts facts={[['State', invitation.hasReported ? 'reported' : stateWords[invitation.state]], ['Asked', formatDay(invitation.invitedAt)], ...(invitation.reportDue ? [['Report due', formatDay(invitation.reportDue)] as const] : [])]} />
            <Flags flags={invitation.flags} />
            {invitation.reason && <p className="text-small text-ink-2">Your reason: {invitation.reason}</p>}
            {invitation.state === 'asked' && <ActButton act={withdrawInvitation} input={{ id: invitation.id }} busy="Taking it back" size="low" tone="quiet">Take the invitation back</ActButton>}
          </div>
        ))}
        {desk.may.invite && <InviteForm submissionId={desk.submissionId} candidates={candidates} />}
      </div>
    </Card>
  );
}

/** Visibly another frame: nothing in it is part of a report or a thread. */
function EditorNotes({ desk }: { readonly desk: DeskView }) {
  return (
    <section aria-labelledby="notes-h" className="min-w-0 rounded border-[3px] border-ink bg-sheet">
      <h3 id="notes-h" className="bg-ink px-4 py-2 text-h3 text-page">For the editor only</h3>
      <div className="grid gap-3 px-4 py-3">
        {desk.notes.map((note) => (
          <div key={note.id}>
            <p className="text-small text-ink-2"><strong className="text-ink">{note.by}</strong>{note.yours && ' (you)'} · {formatInstant(note.at)}</p>
            <p className="whitespace-pre-wrap text-ui">{note.body}</p>
          </div>
        ))}
        {desk.may.noteToEditor && <NoteForm submissionId={desk.submissionId} />}
      </div>
    </section>
  );
}
