import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { StoreEnv } from '@/lib/env';
import { ensureBucket } from '@/lib/storage/s3-store';
import { startMailReader } from '@/lib/tools/fakes/mail-reader';
import type { ReceivedMail } from '@/lib/tools/fakes/mail-message';
import { startMailSink as startSink } from '@/lib/tools/fakes/mail-sink';
import { startObjectStoreFake } from '@/lib/tools/fakes/object-store';

export interface TestObjectStore {
  /** For `createS3Store`, or to spread into a process environment. */
  readonly env: StoreEnv & { readonly S3_ENDPOINT: string };
  stop(): Promise<void>;
}

/** An empty object store with its bucket, on a port of its own. */
export async function startObjectStore(): Promise<TestObjectStore> {
  const folder = temporaryFolder('objects');
  const key = { accessKeyId: 'test-key', secretAccessKey: randomBytes(24).toString('base64url') };
  const fake = await startObjectStoreFake({ folder, ...key });
  const env = {
    S3_ENDPOINT: fake.endpoint,
    S3_REGION: 'us-east-1',
    S3_BUCKET: 'counterfoil',
    S3_ACCESS_KEY_ID: key.accessKeyId,
    S3_SECRET_ACCESS_KEY: key.secretAccessKey,
  };
  await ensureBucket(env);
  return {
    env,
    async stop() {
      await fake.stop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

export interface TestMailSink {
  readonly smtpUrl: string;
  readonly readerUrl: string;
  messages(): readonly ReceivedMail[];
  stop(): Promise<void>;
}

export async function startMailSink(): Promise<TestMailSink> {
  const folder = temporaryFolder('mail');
  const sink = await startSink({ folder });
  const reader = await startMailReader(sink);
  return {
    smtpUrl: sink.smtpUrl,
    readerUrl: reader.url,
    messages: () => sink.messages(),
    async stop() {
      await Promise.all([sink.stop(), reader.stop()]);
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

export const temporaryFolder = (what: string): string => mkdtempSync(path.join(tmpdir(), `counterfoil-${what}-`));
