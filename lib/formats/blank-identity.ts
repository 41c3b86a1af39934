import { identityIn } from './hidden-identity';
import { join, newline } from './text/scan-bytes';

/** What stands in place of a comment line that says whose the file is; where it has no room, only the letter x. */
export const BLANKED = '[blanked in the copy for referees]';

const signs = [35, 37, 33];
const [space, letterX, carriageReturn] = [32, 120, 13];
/** A comment is looked through in pieces that overlap, so that a long one costs no more than its length. */
const piece = 500;
/** A longer line is no line of a table; what was kept of it is let go. */
const longestLine = 2 ** 18;

function saysWhose(comment: Uint8Array): boolean {
  for (let from = 0; from === 0 || from + piece / 2 < comment.length; from += piece / 2) {
    if (identityIn(new TextDecoder().decode(comment.subarray(from, from + piece)).trim()) !== null) return true;
  }
  return false;
}

function blank(comment: Uint8Array): void {
  const fits = comment.length > BLANKED.length;
  comment.fill(fits ? space : letterX);
  if (fits) comment.set(new TextEncoder().encode(BLANKED), 1);
}

/** Blanks in place. Signs of comments are looked for ahead, each once. */
function blankComments(bytes: Uint8Array): Uint8Array {
  const ahead = signs.map((sign) => bytes.indexOf(sign));
  let from = 0;
  for (;;) {
    ahead.forEach((at, k) => {
      if (at >= 0 && at < from) ahead[k] = bytes.indexOf(signs[k]!, from);
    });
    const found = ahead.filter((at) => at >= 0);
    if (found.length === 0) return bytes;
    const first = Math.min(...found);
    const lineEnd = bytes.indexOf(newline, first);
    const next = lineEnd < 0 ? bytes.length : lineEnd;
    const comment = bytes.subarray(first + 1, bytes[next - 1] === carriageReturn ? next - 1 : next);
    if (saysWhose(comment)) blank(comment);
    from = next;
  }
}

/**
 * A text file in which comments that say whose it is are blanked (V29): as many bytes and lines, every number where it stood.
 * Shape:  bytes to bytes.
 * Error:  none; what no sign of `identityIn` knows stays.
 * Fails:  never, beyond the source.
 * Source: domain reference V29.
 */
export async function* withIdentityBlanked(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  let carry: Uint8Array = new Uint8Array(0);
  for await (const chunk of source) {
    const data = join(carry, chunk);
    const end = data.lastIndexOf(newline) + 1 || (data.length > longestLine ? data.length : 0);
    if (end > 0) yield blankComments(data.slice(0, end));
    carry = data.subarray(end);
  }
  if (carry.length > 0) yield blankComments(carry.slice());
}
