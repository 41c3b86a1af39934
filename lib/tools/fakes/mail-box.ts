import { mkdirSync, readFileSync, readdirSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { parseMail, type ReceivedMail } from '@/lib/tools/fakes/mail-message';

export interface MailBox {
  all(): readonly ReceivedMail[];
  /** The letter is on disk when this returns, so a server may say it accepted it. */
  keep(envelope: { from: string; to: readonly string[] }, raw: string): ReceivedMail;
}

/** Letters in arrival order, one JSON file each. */
export function openMailBox(folder: string): MailBox {
  mkdirSync(folder, { recursive: true });
  const letters: ReceivedMail[] = readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .sort()
    .map((name) => JSON.parse(readFileSync(path.join(folder, name), 'utf8')) as ReceivedMail);
  return {
    all: () => letters,
    keep(envelope, raw) {
      const id = (letters.at(-1)?.id ?? 0) + 1;
      const letter = { id, receivedAt: new Date().toISOString(), ...envelope, ...parseMail(raw), raw };
      writeWhole(path.join(folder, `${String(id).padStart(6, '0')}.json`), JSON.stringify(letter));
      letters.push(letter);
      return letter;
    },
  };
}

/** A rename is all or nothing: a reader never meets half a letter. */
function writeWhole(file: string, text: string): void {
  writeFileSync(`${file}.part`, text, { mode: 0o600 });
  renameSync(`${file}.part`, file);
}
