import { webEnv, type WebEnv } from '@/lib/env';
import { hostsOf, installFrontGate } from '@/lib/http/front-gate';
import { watchParent } from '@/lib/tools/process';

/** Once when the web process starts: refuse a bad environment at once, and do not outlive the supervisor. */
export function register(): void {
  const env = environmentOrEnd();
  if (env.NODE_ENV === 'production') installFrontGate(hostsOf(env));
  if (process.env['SUPERVISED'] === '1') watchParent(() => process.kill(process.pid, 'SIGTERM'));
}

/** The framework would report the error and go on serving, every page a failure. */
function environmentOrEnd(): WebEnv {
  try {
    return webEnv();
  } catch (error) {
    console.error(error instanceof Error ? error.message : error);
    process.exit(1);
  }
}
