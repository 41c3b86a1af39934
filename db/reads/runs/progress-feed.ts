import { Client } from 'pg';
import { database } from '@/db/client';

/**
 * What the worker says about runs, as it says it: one LISTEN connection for the whole process, open
 * only while somebody watches. A word may be lost when it breaks, so a listener is told to look again
 * after every reconnection, and always reads the state itself.
 */
type Listener = (runId: string | null) => void;

const RETRY_MS = 500;

class ProgressFeed {
  private readonly listeners = new Map<string, Set<Listener>>();
  private client: Client | null = null;
  private opening: Promise<void> | null = null;

  /** Resolves once the connection listens: what is read after that misses nothing. */
  async subscribe(submissionId: string, listener: Listener): Promise<() => void> {
    const own = this.listeners.get(submissionId) ?? new Set();
    this.listeners.set(submissionId, own.add(listener));
    await this.open();
    return () => {
      own.delete(listener);
      if (own.size === 0) this.listeners.delete(submissionId);
      if (this.listeners.size === 0) this.close();
    };
  }

  private open(): Promise<void> {
    this.opening ??= this.connect().catch((error: unknown) => {
      this.opening = null;
      throw error;
    });
    return this.opening;
  }

  private async connect(): Promise<void> {
    const { options } = database().$client;
    const client = new Client({ connectionString: options.connectionString, application_name: 'counterfoil-web-progress', keepAlive: true });
    client.on('error', () => this.lost(client));
    client.on('end', () => this.lost(client));
    client.on('notification', ({ payload }) => this.pass(payload));
    await client.connect();
    await client.query('listen run_progress');
    this.client = client;
  }

  private pass(payload: string | undefined): void {
    const { runId, submissionId } = JSON.parse(payload ?? '{}') as { runId?: string; submissionId?: string };
    if (runId && submissionId) for (const listener of this.listeners.get(submissionId) ?? []) listener(runId);
  }

  private lost(client: Client): void {
    if (this.client !== client) return;
    this.client = null;
    this.opening = null;
    if (this.listeners.size > 0) setTimeout(() => void this.reopen(), RETRY_MS).unref();
  }

  private async reopen(): Promise<void> {
    if (this.listeners.size === 0 || this.client) return;
    try {
      await this.open();
      for (const own of this.listeners.values()) for (const listener of own) listener(null);
    } catch {
      setTimeout(() => void this.reopen(), RETRY_MS).unref();
    }
  }

  private close(): void {
    const client = this.client;
    this.client = null;
    this.opening = null;
    void client?.end().catch(() => undefined);
  }
}

const shared = globalThis as { counterfoilProgressFeed?: ProgressFeed };
export const progressFeed = (): ProgressFeed => (shared.counterfoilProgressFeed ??= new ProgressFeed());
