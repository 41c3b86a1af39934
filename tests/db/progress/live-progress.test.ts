import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import { startProgress, tellProgress } from '@/db/writes/runs/tell-progress';
import { progressStream } from '@/lib/http/event-stream';
import { VISITOR, type SignedInActor } from '@/lib/policy/actor';
import { watchProgress } from '@/lib/services/runs/watch-progress';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let id: string;
let runId: string;

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  id = await draftWithBursts(author);
});
afterAll(() => desk.close());

const openStream = async (abort = new AbortController()) => progressStream(must(await watchProgress(author, id)), abort.signal);

/** Reads events until one satisfies `enough`, or the stream ends. */
async function read(response: Response, enough: (text: string) => boolean): Promise<string> {
  const reader = (response.body as ReadableStream<Uint8Array>).getReader();
  let text = '';
  for (;;) {
    const { done, value } = await reader.read();
    text += Buffer.from(value ?? []).toString();
    if (done || enough(text)) {
      reader.releaseLock();
      return text;
    }
  }
}
const listeners = async (): Promise<number> =>
  (await desk.sql<{ n: number }>(`select count(*)::int as n from pg_stat_activity where application_name = 'counterfoil-web-progress' and datname = current_database()`))[0]?.n ?? -1;
const settled = async (n: number): Promise<number> => {
  for (let i = 0; i < 100 && (await listeners()) !== n; i++) await new Promise((resolve) => setTimeout(resolve, 20));
  return listeners();
};

describe('the stream of progress', () => {
  it('does not open while nothing runs', async () => {
    const answer = await openStream();
    expect([answer.status, answer.body]).toEqual([204, null]);
    expect(await settled(0)).toBe(0);
  });

  it('gives a snapshot, then each change, then an end, over one connection for all readers', async () => {
    runId = must(await checkDraft(author, id)).runId;
    const [first, second] = [await openStream(), await openStream()];
    expect(first.headers.get('content-type')).toMatch(/^text\/event-stream/);
    expect(first.headers.get('cache-control')).toBe('no-store, no-transform');
    expect(await read(first, (t) => t.includes('"queued"'))).toContain(`"runId":"${runId}"`);
    expect(await listeners()).toBe(1);
    await startProgress(desk.worker, { runId, submissionId: id, doing: 'fetching the files' }, 1);
    await tellProgress(desk.worker, { runId, submissionId: id, fraction: 0.25, doing: 'C1: match' });
    expect(await read(first, (t) => t.includes('0.25'))).toContain('C1: match');
    await desk.runAll();
    for (const stream of [first, second]) {
      const rest = await read(stream, (t) => t.includes('event: end'));
      expect(rest).toContain('"state":"finished"');
    }
    expect(await settled(0)).toBe(0);
  });

  it('is closed when its reader goes away', async () => {
    await desk.sql(`update revisions set sheet = jsonb_set(sheet::jsonb, '{claims,0,tolerance}', '0.001')::json where submission_id = $1`, id);
    runId = must(await checkDraft(author, id)).runId;
    const abort = new AbortController();
    const stream = await openStream(abort);
    await read(stream, (t) => t.includes('"queued"'));
    abort.abort();
    await read(stream, () => false);
    expect(await settled(0)).toBe(0);
  });

  it('survives a lost connection to the database, and looks again', async () => {
    const stream = await openStream();
    await read(stream, (t) => t.includes('"queued"'));
    const ended = await database().$client.query(`select pg_terminate_backend(pid) as ended from pg_stat_activity where application_name = 'counterfoil-web-progress' and datname = current_database()`);
    expect(ended.rows).toEqual([{ ended: true }]);
    await desk.runAll();
    expect(await read(stream, (t) => t.includes('event: end'))).toContain('event: end');
  });

  it('is for those who may see the runs', async () => {
    for (const other of [VISITOR, await desk.person('L. Quennell')]) expect(await watchProgress(other, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
  });
});
