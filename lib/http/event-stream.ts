import type { ProgressWatch } from '@/lib/services/runs/watch-progress';

const BEAT_MS = 15_000;
/** Browsers keep six connections a host; a stream that nobody closed ends by itself. */
const LONGEST_MS = 15 * 60_000;

const open = new Set<ProgressStream>();
let listening = false;

/** Streams that stay open would hold up a stop of the server by seconds. */
function closeOnStop(): void {
  if (listening) return;
  listening = true;
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => open.forEach((stream) => stream.stop()));
}

/**
 * Server-sent events while something runs: subscribed first, then a snapshot, so that nothing falls
 * between. Each event is the whole small state of one run. `end` says that nothing runs any more, and
 * the reader closes. When nothing runs to begin with, 204 tells the browser not to come back.
 */
export async function progressStream(watch: ProgressWatch, signal: AbortSignal): Promise<Response> {
  closeOnStop();
  const stream = new ProgressStream(watch);
  const body = await stream.begin();
  if (!body) return new Response(null, { status: 204, headers: { 'cache-control': 'no-store' } });
  signal.addEventListener('abort', () => stream.stop(), { once: true });
  return new Response(body, { headers: { 'content-type': 'text/event-stream; charset=utf-8', 'cache-control': 'no-store, no-transform', 'x-accel-buffering': 'no' } });
}

class ProgressStream {
  private readonly changed = new Set<string>();
  private lookAtAll = false;
  private closed = false;
  private wake: () => void = () => undefined;
  private unsubscribe: () => void = () => undefined;
  private controller: ReadableStreamDefaultController<Uint8Array> | null = null;
  private readonly timers: NodeJS.Timeout[] = [];

  constructor(private readonly watch: ProgressWatch) {}

  /** Null when nothing runs. */
  async begin(): Promise<ReadableStream<Uint8Array> | null> {
    this.unsubscribe = await this.watch.subscribe((runId) => this.heard(runId));
    const first = await this.watch.running().catch((error: unknown) => {
      this.unsubscribe();
      throw error;
    });
    if (first.length === 0) {
      this.unsubscribe();
      return null;
    }
    return new ReadableStream({
      start: (controller) => {
        this.controller = controller;
        open.add(this);
        this.timers.push(setInterval(() => this.send(': still here\n\n'), BEAT_MS), setTimeout(() => this.stop(), LONGEST_MS));
        this.send('retry: 2000\n\n');
        void this.follow(first);
      },
      cancel: () => this.stop(),
    });
  }

  stop(): void {
    if (this.closed) return;
    this.closed = true;
    this.timers.forEach((timer) => clearTimeout(timer));
    this.unsubscribe();
    open.delete(this);
    this.wake();
    try {
      this.controller?.close();
    } catch {
      // The reader was gone first.
    }
  }

  private heard(runId: string | null): void {
    if (runId === null) this.lookAtAll = true;
    else this.changed.add(runId);
    this.wake();
  }

  private async follow(first: readonly unknown[]): Promise<void> {
    try {
      let events = first;
      while (!this.closed) {
        for (const event of events) this.send(`event: progress\ndata: ${JSON.stringify(event)}\n\n`);
        if ((await this.watch.running()).length === 0 && this.changed.size === 0) break;
        await this.somethingNew();
        events = await this.news();
      }
      this.send('event: end\ndata: {}\n\n');
    } catch {
      // The database went away; the browser comes back and gets a new snapshot.
    }
    this.stop();
  }

  private somethingNew(): Promise<void> {
    return new Promise((resolve) => {
      this.wake = resolve;
      if (this.changed.size > 0 || this.lookAtAll || this.closed) resolve();
    });
  }

  private async news(): Promise<readonly unknown[]> {
    const ids = [...this.changed];
    this.changed.clear();
    const running = this.lookAtAll ? await this.watch.running() : [];
    this.lookAtAll = false;
    const named = await Promise.all(ids.map((id) => this.watch.one(id)));
    return [...running, ...named.filter((event) => event !== undefined)];
  }

  private send(text: string): void {
    if (!this.closed) this.controller?.enqueue(new TextEncoder().encode(text));
  }
}
