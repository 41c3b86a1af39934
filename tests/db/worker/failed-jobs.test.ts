import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { layAsideSpentJobs } from '@/lib/worker/lay-aside';
import { assertDurable } from '@/lib/worker/assert-durable';
import { listFailedJobs, retryJob } from '@/lib/services/jobs/failed-jobs';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
beforeAll(async () => {
  desk = await openServiceDesk();
});
afterAll(() => desk.close());

const jobs = () => desk.worker.$client.query('select attempts, payload from graphile_worker._private_jobs').then((r) => r.rows);

describe('a job whose tries are used up', () => {
  it('is laid aside once, however many look, and tried again when the administrator asks', async () => {
    const author = await desk.person('T. Marrable');
    const administrator = await desk.person('A. Administrator', 'administrator');
    const id = await draftWithBursts(author);
    const { runId } = must(await checkDraft(author, id));
    await desk.worker.$client.query(`update graphile_worker._private_jobs set attempts = max_attempts, last_error = 'out of memory'`);
    const other = openDatabase(desk.db.workerUrl);
    const counts = await Promise.all([layAsideSpentJobs(desk.worker), layAsideSpentJobs(other)]);
    await other.$client.end();
    expect(counts[0] + counts[1]).toBe(1);
    expect(await jobs()).toEqual([]);
    expect(must(await getDraft(author, id)).check?.run.state).toBe('stopped');
    expect(await listFailedJobs(author)).toMatchObject({ ok: false, error: { code: 'denied' } });
    const [failed] = must(await listFailedJobs(administrator));
    expect(failed).toMatchObject({ task: 'run-submission', payload: { runId }, attempts: 3, lastError: 'out of memory' });
    must(await retryJob(administrator, failed?.id ?? ''));
    expect(await jobs()).toEqual([{ attempts: 0, payload: { runId } }]);
    await desk.runAll();
    expect(must(await getDraft(author, id)).check?.run.state).toBe('measured');
  });

  it('that had finished before its worker died is no failure', async () => {
    const before = (await desk.sql('select 1 from failed_jobs')).length;
    await desk.worker.$client.query(`update graphile_worker._private_jobs set attempts = max_attempts`);
    await layAsideSpentJobs(desk.worker);
    expect([await jobs(), (await desk.sql('select 1 from failed_jobs')).length]).toEqual([[], before]);
  });
});

describe('a database set for speed', () => {
  it('stops the worker at its start', async () => {
    await expect(assertDurable(desk.worker)).rejects.toThrow(/fsync = off/);
  });
});
