import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createS3Store } from '@/lib/storage/s3-store';

const MIB = 1024 * 1024;

/** Takes parts in, and answers for none of them: a store that is slower than any sender. */
class StalledStore {
  receivedBytes = 0;
  private server: Server = createServer((request, response) => this.answer(request, response));
  private waiting: (() => void)[] = [];

  async start(): Promise<string> {
    await new Promise<void>((resolve) => this.server.listen(0, '127.0.0.1', resolve));
    return `http://127.0.0.1:${(this.server.address() as AddressInfo).port}`;
  }

  stop(): void {
    this.server.closeAllConnections();
    this.server.close();
  }

  async received(bytes: number): Promise<void> {
    while (this.receivedBytes < bytes) await new Promise<void>((resolve) => this.waiting.push(resolve));
  }

  private answer(request: IncomingMessage, response: ServerResponse): void {
    if (request.method === 'POST' && request.url?.includes('uploads')) {
      response.end('<InitiateMultipartUploadResult><UploadId>one</UploadId></InitiateMultipartUploadResult>');
      return;
    }
    request.on('data', (chunk: Buffer) => {
      this.receivedBytes += chunk.length;
      this.waiting.splice(0).forEach((wake) => wake());
    });
  }
}

describe('an upload holds a few parts in memory, however large the file', () => {
  const stalled = new StalledStore();
  let endpoint: string;
  beforeAll(async () => {
    endpoint = await stalled.start();
  });
  afterAll(() => stalled.stop());

  it('a sender of 400 MB is held back while the store has not answered for two parts', async () => {
    let produced = 0;
    const source = Readable.from(
      (function* () {
        for (const chunk = Buffer.alloc(64 * 1024); produced < 400 * MIB; produced += chunk.length) yield chunk;
      })(),
    );
    const store = createS3Store({
      S3_ENDPOINT: endpoint,
      S3_REGION: 'us-east-1',
      S3_BUCKET: 'bucket',
      S3_ACCESS_KEY_ID: 'key',
      S3_SECRET_ACCESS_KEY: 'unused-secret-of-a-test',
    });
    const upload = store.put('large', source).catch((error: Error) => error);
    await stalled.received(2 * 5 * MIB);
    // Ten thousand turns of the event loop are enough for an unbounded reader to take in all 400 MB.
    for (let turn = 0; turn < 10_000; turn++) await new Promise((resolve) => setImmediate(resolve));
    expect(produced).toBeLessThan(24 * MIB);
    source.destroy(new Error('enough'));
    stalled.stop();
    expect(await upload).toBeInstanceOf(Error);
  });
});
