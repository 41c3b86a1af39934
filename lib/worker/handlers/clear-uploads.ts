import { listOverdueUploads, listUploadParts } from '@/db/reads/files/uploads';
import { clearOverdueUpload } from '@/db/writes/files/uploads';
import { parsePayload } from '@/lib/jobs/tasks';
import type { Handler } from './handler';

const AT_A_TIME = 50;

/** Bytes first, rows after: a worker that dies in between finds the rows again and removes what is left. */
export const clearUploads: Handler = async (payload, room) => {
  parsePayload('clear-uploads', payload);
  for (;;) {
    const overdue = await listOverdueUploads(room.database, AT_A_TIME);
    for (const { id } of overdue) {
      for (const { storageKey } of await listUploadParts(room.database, id)) await room.store.remove(storageKey);
      await clearOverdueUpload(room.database, id);
    }
    if (overdue.length < AT_A_TIME || room.signal.aborted) return;
  }
};
