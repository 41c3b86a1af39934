import { problemBody, type DoorErrorCode } from './problem-response';

/** What each kind of refusal means and what to do next: the text of the address in its `type`. */
const MEANINGS: Readonly<Record<DoorErrorCode, { readonly means: string; readonly next: string }>> = {
  malformed: { means: 'The request broke off or is not HTTP: a method nobody knows, a header without its colon, a wrong length.', next: 'Send it with an ordinary HTTP library.' },
  invalid: { means: 'The request was read, and something in it is not acceptable.', next: 'Each entry of `problems` says where, what was seen and what was expected. Mend them all and send it again.' },
  'signed-out': { means: 'This needs somebody, and nobody was named.', next: 'Sign in, or send a token in the Authorization header.' },
  'bad-credential': { means: 'A token was sent and opens nothing: it is not known, has expired, or was revoked.', next: 'Make a new one in your account. A request with a token never falls back to the session.' },
  denied: { means: 'You are known, and this is not part of your role here or of the token’s scopes.', next: 'The sentence in `detail` names the scope or the part that would do.' },
  'foreign-origin': { means: 'A write came with a session from somewhere else than this site’s own pages.', next: 'Send it with a token, which needs no origin.' },
  'not-found': { means: 'There is nothing at this address, or nothing you may see; the two are answered alike.', next: 'Look at the id. If it is right, ask somebody who has a part in the submission.' },
  'method-not-allowed': { means: 'The address is known, and not with this method.', next: 'The header Allow lists those that are.' },
  conflict: { means: 'Things have moved on since you looked, or an Idempotency-Key was used for another request.', next: 'Read it again and decide anew; use a new key for a new act.' },
  precondition: { means: 'What the request rests on does not hold: another version stands, or something has to be done first.', next: 'Read what stands now, do what `detail` names, and repeat the request.' },
  'precondition-required': { means: 'An edit has to say which version it was made on, so that nobody’s edit is lost.', next: 'Send If-Match with the ETag of the draft.' },
  'too-large': { means: 'The body is longer than what is read here.', next: 'Send files as files, in multipart/form-data.' },
  'unsupported-media': { means: 'The body has a form that is not read here.', next: 'Send application/json, or multipart/form-data where files are taken.' },
  misdirected: { means: 'The request names a host for which this server does not answer.', next: 'Use the address under which you know the site.' },
  limit: { means: 'This was asked too often, or a quota is used up.', next: 'Wait as long as Retry-After says.' },
  defect: { means: 'Something broke on our side; nothing was changed.', next: 'Try again, with the same Idempotency-Key. If it stays, tell the administrator the reference.' },
};

const CODES = Object.keys(MEANINGS) as DoorErrorCode[];

export const EXPLAINED_PROBLEMS = CODES.map((code) => {
  const { title, status } = problemBody({ code, sentence: '' });
  return { code, title, status, ...MEANINGS[code] };
}).toSorted((a, b) => a.status - b.status);

export const findProblemMeaning = (code: string) => EXPLAINED_PROBLEMS.find((problem) => problem.code === code);
