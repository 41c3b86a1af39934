import type { Reader } from '@/db/client';
import { listComments, listThreads } from '@/db/reads/reviews/threads';
import type { LetterThread } from '@/lib/reviews/letter';

/** Threads with their opening words, for the points of a letter. */
export async function loadLetterThreads(reader: Reader, submissionId: string): Promise<LetterThread[]> {
  const rows = await listThreads(reader, submissionId);
  const comments = await listComments(reader, rows.map((t) => t.id));
  return rows.map((t) => ({
    id: t.id,
    kind: t.kind,
    state: t.state,
    visibility: t.visibility,
    anchor: t.anchor,
    opening: firstSentence(comments.find((c) => c.threadId === t.id)?.body ?? ''),
  }));
}

const OPENING_CHARACTERS = 240;

/** A point of a letter is a line: the first paragraph, cut at a word. */
function firstSentence(body: string): string {
  const line = (body.split(/\n\s*\n/)[0] ?? '').replace(/\s+/g, ' ').trim();
  if (line.length <= OPENING_CHARACTERS) return line;
  return `${line.slice(0, OPENING_CHARACTERS).replace(/\s+\S*$/, '')} …`;
}
