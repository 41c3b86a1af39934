import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { Pool, type PoolConfig } from 'pg';

/**
 * The door to the cellar. A process opens one database under its own role and every read and write
 * goes through it; which role that is decides what can be read at all.
 */
export type Database = NodePgDatabase & { readonly $client: Pool };
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];
/** Reads run inside or outside a transaction alike. */
export type Reader = Database | Transaction;

interface OpenOptions extends Pick<PoolConfig, 'max' | 'application_name'> {
  /** Told of a connection that broke while idle; without a listener the process would end. */
  readonly onError?: (error: Error) => void;
}

export function openDatabase(url: string, { onError, ...options }: OpenOptions = {}): Database {
  const pool = new Pool({ connectionString: url, max: 10, statement_timeout: 30_000, idle_in_transaction_session_timeout: 60_000, ...options });
  const report = onError ?? ((error: Error) => console.error(`database: ${error.message}`));
  pool.on('error', report);
  pool.on('connect', (client) => client.on('error', report));
  return drizzle(pool) as Database;
}

/** On globalThis, because a bundler may load this module once for pages and once for routes. */
const shared = globalThis as { counterfoilDatabase?: Database };

export function useDatabase(database: Database): void {
  shared.counterfoilDatabase = database;
}

/** This process's database; opened from DATABASE_URL (the web role) unless another was set before. */
export function database(): Database {
  shared.counterfoilDatabase ??= openFromEnvironment();
  return shared.counterfoilDatabase;
}

function openFromEnvironment(): Database {
  const url = process.env['DATABASE_URL'];
  if (!url) throw new Error('DATABASE_URL is not set; expected the address of the database for the web role.');
  return openDatabase(url, { application_name: 'counterfoil-web' });
}

/** For tests and a clean stop. */
export async function closeDatabase(): Promise<void> {
  const open = shared.counterfoilDatabase;
  delete shared.counterfoilDatabase;
  await open?.$client.end();
}
