import { webEnv } from '@/lib/env';
import { hostsOf, installFrontGate } from '@/lib/http/front-gate';
import { watchParent } from '@/lib/tools/process';

/** Once when the web process starts: refuse a bad environment at once, and do not outlive the supervisor. */
export function register(): void {
  const env = webEnv();
  if (env.NODE_ENV === 'production') installFrontGate(hostsOf(env));
  if (process.env['SUPERVISED'] === '1') watchParent(() => process.kill(process.pid, 'SIGTERM'));
}
