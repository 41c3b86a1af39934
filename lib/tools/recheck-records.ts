import { database } from '@/db/client';
import { listRecords } from '@/db/reads/records/record';
import { ENGINE_VERSION } from '@/lib/engine/version';
import type { SignedInActor } from '@/lib/policy/actor';
import type { Outcome } from '@/lib/services/app-error';
import { concludeRecheck } from '@/lib/services/records/conclude-recheck';
import { documentOf } from '@/lib/services/records/record-document';
import { requestRecheck } from '@/lib/services/records/request-recheck';

interface RecheckRoom {
  /** Resolves when this run has a result. */
  readonly compute: (runId: string) => Promise<void>;
}

/** Every record that stands and was measured by another engine, measured again by this one. */
export async function recheckRecords(room: RecheckRoom, administrator: SignedInActor, say: (line: string) => void): Promise<void> {
  for (const record of await listRecords(database())) {
    const { title, engine } = documentOf(record);
    if (engine === ENGINE_VERSION || (record.standing !== 'entered' && record.standing !== 'under-recheck')) continue;
    const { runId } = valueOf(await requestRecheck(administrator, record.id));
    await room.compute(runId);
    const { sentence } = valueOf(await concludeRecheck(administrator, record.id, runId));
    say(`“${title}”: ${sentence}`);
  }
}

function valueOf<T>(outcome: Outcome<T>): T {
  if (outcome.ok) return outcome.value;
  throw new Error(`${outcome.error.code}: ${outcome.error.sentence}`);
}
