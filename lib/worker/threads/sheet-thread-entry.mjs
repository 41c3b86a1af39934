/**
 * The thread's first file: threads do not take over the process's TypeScript loader on Node 20,
 * so it is registered here before the first import of ours. The import waits for the first task,
 * so that a file which does not load fails that task; failing earlier, it would hang it.
 */
import { register } from 'tsx/esm/api';

register();

export default async function runTask(task) {
  const { default: sheetThread } = await import('./sheet-thread.ts');
  return sheetThread(task);
}
