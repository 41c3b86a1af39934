import { and, asc, count, desc, eq, gte, inArray, lte, sql, type SQL } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { recordStandings, records } from '@/db/schema/records';
import { registerClaims, registerEntries } from '@/db/schema/register';
import type { RecordStanding } from '@/lib/badges/standing';

/** What a record has to be. Quantity, verdict and noise curve are asked of one and the same claim. */
export interface RegisterAsk {
  /** As people type it: words, "a phrase", or, -without. */
  readonly text?: string | undefined;
  readonly quantity?: string | undefined;
  readonly verdict?: string | undefined;
  readonly noise?: string | undefined;
  /** UTC days, both included. */
  readonly from?: string | undefined;
  readonly to?: string | undefined;
  readonly standing?: RecordStanding | undefined;
}

/** `changed`: the newest entry or change of standing first. Any `after` goes with `newest` alone. */
export type RegisterOrder = 'newest' | 'oldest' | 'title' | 'relevance' | 'changed';
export interface RegisterPlace {
  readonly limit: number;
  readonly offset?: number;
  /** Id of the last record seen: records are never removed, so the place holds while others are entered. */
  readonly after?: string | undefined;
}

/** The newest standing of each record is the one that holds. */
const standingNow = (reader: Reader) =>
  reader
    .selectDistinctOn([recordStandings.recordId], { recordId: recordStandings.recordId, standing: recordStandings.standing, since: recordStandings.since, reason: recordStandings.reason })
    .from(recordStandings)
    .orderBy(recordStandings.recordId, desc(recordStandings.since), desc(recordStandings.id))
    .as('standing_now');
type StandingNow = ReturnType<typeof standingNow>;

/** Words of the language by their stems; a text that holds none (a name such as Will) as it stands. */
const wordsOf = (text: string): SQL =>
  sql`(case when numnode(websearch_to_tsquery('english', ${text})) > 0 then websearch_to_tsquery('english', ${text}) else websearch_to_tsquery('simple', ${text}) end)`;

const claimFits = ({ quantity, verdict, noise }: RegisterAsk): SQL | undefined =>
  and(
    quantity === undefined ? undefined : eq(registerClaims.quantity, quantity),
    verdict === undefined ? undefined : eq(registerClaims.verdict, verdict),
    noise === undefined ? undefined : eq(registerClaims.noise, noise),
  );

function fits(ask: RegisterAsk, now: StandingNow): SQL | undefined {
  const claim = claimFits(ask);
  return and(
    ask.text === undefined ? undefined : sql`(${registerEntries.search} @@ ${wordsOf(ask.text)} or ${registerEntries.recordId} = lower(${ask.text}))`,
    claim && sql`exists (select 1 from ${registerClaims} where ${registerClaims.recordId} = ${registerEntries.recordId} and ${claim})`,
    ask.from === undefined ? undefined : gte(registerEntries.enteredOn, ask.from),
    ask.to === undefined ? undefined : lte(registerEntries.enteredOn, ask.to),
    ask.standing === undefined ? undefined : eq(now.standing, ask.standing),
  );
}

/** The id settles ties, so that no record is met twice or missed between two pages. */
function inOrder(order: RegisterOrder, ask: RegisterAsk, now: StandingNow): SQL[] {
  const newest = [desc(registerEntries.enteredAt), desc(registerEntries.recordId)];
  switch (order) {
    case 'oldest':
      return [asc(registerEntries.enteredAt), asc(registerEntries.recordId)];
    case 'title':
      return [sql`lower(${registerEntries.title})`, ...newest];
    case 'relevance':
      return [...(ask.text === undefined ? [] : [sql`ts_rank(${registerEntries.search}, ${wordsOf(ask.text)}) desc`]), ...newest];
    case 'changed':
      return [sql`greatest(${registerEntries.enteredAt}, ${now.since}) desc`, ...newest];
    default:
      return newest;
  }
}

/** Compared inside the database, whose clock is finer than ours. */
const beyond = (after: string | undefined): SQL | undefined =>
  after === undefined ? undefined : sql`(${registerEntries.enteredAt}, ${registerEntries.recordId}) < (select entered_at, record_id from ${registerEntries} where record_id = ${after})`;

/** One page of entries, in order; the one statement behind register, exports, feed and interface. */
export function listRegister(reader: Reader, ask: RegisterAsk, order: RegisterOrder, { limit, offset = 0, after }: RegisterPlace) {
  const now = standingNow(reader);
  return reader
    .select({
      id: registerEntries.recordId,
      title: registerEntries.title,
      authors: registerEntries.authors,
      enteredAt: registerEntries.enteredAt,
      enteredOn: registerEntries.enteredOn,
      revision: records.revision,
      level: records.level,
      digest: records.documentDigest,
      standing: now.standing,
      since: now.since,
      reason: now.reason,
    })
    .from(registerEntries)
    .innerJoin(records, eq(records.id, registerEntries.recordId))
    .innerJoin(now, eq(now.recordId, registerEntries.recordId))
    .where(and(fits(ask, now), beyond(after)))
    .orderBy(...inOrder(order, ask, now))
    .limit(limit)
    .offset(offset);
}
export type RegisterEntryRow = Awaited<ReturnType<typeof listRegister>>[number];

export async function countRegister(reader: Reader, ask: RegisterAsk): Promise<number> {
  const now = standingNow(reader);
  const [row] = await reader.select({ n: count() }).from(registerEntries).innerJoin(now, eq(now.recordId, registerEntries.recordId)).where(fits(ask, now));
  return row?.n ?? 0;
}

/** Claims of these records in their printed order; with an ask, only those that fit it. */
export const listRegisterClaims = (reader: Reader, recordIds: readonly string[], ask: RegisterAsk = {}) =>
  reader.select().from(registerClaims).where(and(inArray(registerClaims.recordId, [...recordIds]), claimFits(ask))).orderBy(asc(registerClaims.recordId), asc(registerClaims.position));

/** What the register can be asked for today. */
export async function listRegisterChoices(reader: Reader): Promise<{ readonly quantities: readonly string[]; readonly noises: readonly string[] }> {
  const quantities = await reader.selectDistinct({ word: registerClaims.quantity }).from(registerClaims).orderBy(asc(registerClaims.quantity));
  const noises = await reader.selectDistinct({ word: registerClaims.noise }).from(registerClaims).orderBy(asc(registerClaims.noise));
  return { quantities: quantities.map((row) => row.word), noises: noises.map((row) => row.word) };
}

/** Does the text hold anything to search by? Punctuation and little words alone do not. */
export async function holdsWords(reader: Reader, text: string): Promise<boolean> {
  const { rows } = await reader.execute<{ n: number }>(sql`select numnode(${wordsOf(text)}) as n`);
  return (rows[0]?.n ?? 0) > 0;
}

export const listDocuments = (reader: Reader, recordIds: readonly string[]) =>
  reader.select({ id: records.id, document: records.document }).from(records).where(inArray(records.id, [...recordIds]));

/** For a cursor: is there such a record? */
export async function isInRegister(reader: Reader, id: string): Promise<boolean> {
  const [row] = await reader.select({ n: count() }).from(registerEntries).where(eq(registerEntries.recordId, id));
  return (row?.n ?? 0) > 0;
}
