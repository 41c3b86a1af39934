import { z } from 'zod';

/**
 * The environment, read once at the edge: one function per process, so that no process
 * can reach for a secret that belongs to another. Nothing has a silent default but the
 * harmless; a secret that is missing, short or well known stops the process.
 */
type Source = Readonly<Record<string, string | undefined>>;

const WELL_KNOWN = ['postgres', 'password', 'secret', 'changeme', 'change-me', 'example', 'admin', 'counterfoil', 'minioadmin', 'test'];
const isWellKnown = (secret: string): boolean => WELL_KNOWN.includes(secret.toLowerCase());

const url = (...protocols: string[]) =>
  z.string().refine((text) => protocols.includes(protocolOf(text)), `expected an address that begins with ${protocols.join('// or ')}//`);

const databaseUrl = url('postgres:', 'postgresql:').refine(
  (text) => !isWellKnown(decodeURIComponent(new URL(text).password)),
  'the password is one that everybody knows; expected a generated one',
);

const secret = (atLeast: number) =>
  z
    .string()
    .min(atLeast, `expected at least ${atLeast} random characters`)
    .refine(
      (text) => !isWellKnown(text) && new Set(text).size > 5,
      'expected a generated value, for example from `openssl rand -base64 33`',
    );

const flag = z
  .enum(['0', '1'])
  .default('0')
  .transform((text) => text === '1');

const place = {
  NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
  /** Where people reach the application; the exact origin of every write. */
  APP_URL: url('http:', 'https:').transform((text) => new URL(text).origin),
  /** `1` under `npm start`: invented accounts, mail kept in a local reader. */
  DEMO: flag,
};

const store = {
  S3_ENDPOINT: url('http:', 'https:').optional(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: z.string().min(3),
  S3_ACCESS_KEY_ID: z.string().min(3),
  S3_SECRET_ACCESS_KEY: secret(16),
};

const web = z.object({
  ...place,
  ...store,
  DATABASE_URL: databaseUrl,
  AUTH_SECRET: secret(32),
  /** Address of the proxy whose X-Forwarded-For is believed; nobody's when absent. */
  TRUSTED_PROXY: z.string().optional(),
  MAIL_READER_URL: url('http:', 'https:').optional(),
  /** Sign-in with ORCID: all three, or the button is not there. */
  ORCID_ISSUER: url('http:', 'https:').transform((text) => new URL(text).origin).optional(),
  ORCID_CLIENT_ID: z.string().min(3).optional(),
  ORCID_CLIENT_SECRET: secret(16).optional(),
});

const worker = z.object({
  ...place,
  ...store,
  WORKER_DATABASE_URL: databaseUrl,
  SMTP_URL: url('smtp:', 'smtps:'),
  MAIL_FROM: z.string().regex(/.@./, 'expected an address such as `Counterfoil <desk@counterfoil.example>`'),
});

const signer = z.object({
  ...place,
  ...store,
  SIGNER_DATABASE_URL: databaseUrl,
  /** Private key in PKCS #8 PEM, readable by the signer's user alone. */
  SIGNING_KEY_FILE: z.string().min(1),
});

const migration = z.object({
  /** A superuser, needed only when roles or the database are still missing. */
  ADMIN_DATABASE_URL: databaseUrl.optional(),
  OWNER_DATABASE_URL: databaseUrl,
  DATABASE_URL: databaseUrl,
  WORKER_DATABASE_URL: databaseUrl,
  SIGNER_DATABASE_URL: databaseUrl,
});

export type WebEnv = z.infer<typeof web>;
export type WorkerEnv = z.infer<typeof worker>;
export type SignerEnv = z.infer<typeof signer>;
export type MigrationEnv = z.infer<typeof migration>;
export type StoreEnv = Pick<WebEnv, keyof typeof store>;
export type MailEnv = Pick<WorkerEnv, 'SMTP_URL' | 'MAIL_FROM'>;

export const webEnv = (source: Source = process.env): WebEnv => guardProvider(guardPlace(read('web', web, source)));
export const workerEnv = (source: Source = process.env): WorkerEnv => guardPlace(read('worker', worker, source));
export const signerEnv = (source: Source = process.env): SignerEnv => guardPlace(read('signer', signer, source));
export const migrationEnv = (source: Source = process.env): MigrationEnv => read('migration', migration, source);

function read<T>(processName: string, schema: z.ZodType<T>, source: Source): T {
  const filled = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== undefined && value !== ''));
  const parsed = schema.safeParse(filled);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
  throw new Error(`The ${processName} cannot start; these environment variables need mending:\n${lines.join('\n')}`);
}

/** The demo's accounts are printed on a screen, so they may never face a network. */
function guardPlace<T extends { NODE_ENV: string; APP_URL: string; DEMO: boolean }>(env: T): T {
  if (env.NODE_ENV !== 'production' || isLoopback(env.APP_URL)) return env;
  if (env.DEMO) throw new Error(`DEMO=1 is for this machine alone, but APP_URL is ${env.APP_URL}; unset DEMO.`);
  if (!env.APP_URL.startsWith('https:')) throw new Error(`APP_URL is ${env.APP_URL}; outside this machine it has to begin with https://.`);
  return env;
}

/** A provider half named would fail at somebody's first sign-in; one without TLS would vouch for anybody. */
function guardProvider(env: WebEnv): WebEnv {
  const given = [env.ORCID_ISSUER, env.ORCID_CLIENT_ID, env.ORCID_CLIENT_SECRET].filter(Boolean).length;
  if (given !== 0 && given !== 3) throw new Error('ORCID_ISSUER, ORCID_CLIENT_ID and ORCID_CLIENT_SECRET belong together: set all three, or none.');
  if (env.ORCID_ISSUER?.startsWith('http:') && !isLoopback(env.ORCID_ISSUER)) throw new Error(`ORCID_ISSUER is ${env.ORCID_ISSUER}; outside this machine it has to begin with https://.`);
  return env;
}

export const isLoopback = (address: string): boolean => ['localhost', '127.0.0.1', '[::1]'].includes(new URL(address).hostname);

function protocolOf(text: string): string {
  try {
    return new URL(text).protocol;
  } catch {
    return '';
  }
}
