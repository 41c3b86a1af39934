import { webEnv } from '@/lib/env';
import { watchParent } from '@/lib/tools/process';

/** Once when the web process starts: refuse a bad environment at once, and do not outlive the supervisor. */
export function register(): void {
  webEnv();
  if (process.env['SUPERVISED'] === '1') watchParent(() => process.kill(process.pid, 'SIGTERM'));
}
