/**
 * The thread's first file: threads do not take over the process's TypeScript loader on Node 20,
 * so it is registered here before the first import of ours.
 */
import { register } from 'tsx/esm/api';

register();

const { answer } = await import('./hdf5-thread.ts');
await answer();
