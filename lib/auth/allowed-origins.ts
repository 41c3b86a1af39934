import { isLoopback } from '@/lib/env';

/**
 * The exact origins from which a write is taken. In the demo both names of this machine count, since
 * a person types either; anywhere else there is one.
 */
export function allowedOrigins(env: { readonly APP_URL: string; readonly DEMO: boolean }): readonly string[] {
  if (!env.DEMO || !isLoopback(env.APP_URL)) return [env.APP_URL];
  return ['localhost', '127.0.0.1'].map((name) => {
    const url = new URL(env.APP_URL);
    url.hostname = name;
    return url.origin;
  });
}
