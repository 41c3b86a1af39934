import type { RecordId } from './record';

/** No i, l, o, u: a number that is read out or typed off a badge is not misread. */
const ALPHABET = '0123456789abcdefghjkmnpqrstvwxyz';

/** `4q7m-2tnd`: 40 random bits. `pick(n)` gives an integer in [0, n). */
export function drawRecordId(pick: (n: number) => number): RecordId {
  const letters = Array.from({ length: 8 }, () => ALPHABET[pick(ALPHABET.length)]).join('');
  return `${letters.slice(0, 4)}-${letters.slice(4)}` as RecordId;
}

export const isRecordId = (text: string): text is RecordId => /^[0-9a-hjkmnp-tv-z]{4}-[0-9a-hjkmnp-tv-z]{4}$/.test(text);
