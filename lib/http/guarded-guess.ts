import { forgetGuesses, guessingRests, noteWrongGuess } from './guess-limit';
import { problemResponse } from './problem-response';

/** Asks the sign-in library for something that a password opens, unless too many wrong ones came before. `key` is an address or an account. */
export async function guardedGuess(key: string, ask: () => Promise<Response>): Promise<Response> {
  const retryAfterS = await guessingRests(key);
  if (retryAfterS > 0)
    return problemResponse({ code: 'limit', sentence: `Too many wrong passwords for this account. Wait ${Math.ceil(retryAfterS / 60)} min, or choose a new password by mail.`, retryAfterS });
  const answer = await ask();
  if (await wasWrong(answer)) await noteWrongGuess(key);
  if (answer.ok) await forgetGuesses(key);
  return answer;
}

/** At sign-in the library answers 401; inside a session 400, with the reason in a word. */
async function wasWrong(answer: Response): Promise<boolean> {
  if (answer.status !== 400) return answer.status === 401;
  const said = (await answer.clone().json().catch(() => null)) as { code?: unknown } | null;
  return said?.code === 'INVALID_PASSWORD';
}
