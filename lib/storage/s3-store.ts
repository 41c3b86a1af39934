import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import {
  CreateBucketCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  S3Client,
  S3ServiceException,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import type { StoreEnv } from '@/lib/env';
import { hashingStream } from '@/lib/storage/hashing-stream';
import { ObjectMissing, type ObjectStore, type StoredObject } from '@/lib/storage/object-store';

/** Two parts of this size in flight bound the memory of an upload. */
const PART_BYTES = 5 * 1024 * 1024;
const PARTS_IN_FLIGHT = 2;

export function createS3Store(env: StoreEnv): ObjectStore {
  const client = clientFor(env);
  const at = (key: string): { Bucket: string; Key: string } => ({ Bucket: env.S3_BUCKET, Key: key });
  return {
    put: (key, stream, options) => put(client, at(key), stream, options?.size),
    get: (key) => get(client, at(key)),
    async head(key) {
      const found = await unlessMissing(client.send(new HeadObjectCommand(at(key))));
      return found && { bytes: found.ContentLength ?? 0 };
    },
    async remove(key) {
      await unlessMissing(client.send(new DeleteObjectCommand(at(key))));
    },
  };
}

/** Creates the bucket when it is not there; answers when the store does, so it also serves as a check. */
export async function ensureBucket(env: StoreEnv): Promise<void> {
  const client = clientFor(env);
  const bucket = { Bucket: env.S3_BUCKET };
  if (await unlessMissing(client.send(new HeadBucketCommand(bucket)))) return;
  await client.send(new CreateBucketCommand(bucket));
}

export async function bucketAnswers(env: StoreEnv): Promise<boolean> {
  const client = clientFor(env);
  try {
    await client.send(new HeadBucketCommand({ Bucket: env.S3_BUCKET }), { abortSignal: AbortSignal.timeout(2000) });
    return true;
  } catch {
    return false;
  } finally {
    client.destroy();
  }
}

function clientFor(env: StoreEnv): S3Client {
  return new S3Client({
    region: env.S3_REGION,
    endpoint: env.S3_ENDPOINT,
    forcePathStyle: env.S3_ENDPOINT !== undefined,
    credentials: { accessKeyId: env.S3_ACCESS_KEY_ID, secretAccessKey: env.S3_SECRET_ACCESS_KEY },
    // The newer trailing checksums are refused by many compatible stores; we hash every byte ourselves.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
}

async function put(client: S3Client, at: { Bucket: string; Key: string }, source: Readable, declaredBytes?: number): Promise<StoredObject> {
  const hashed = hashingStream(declaredBytes);
  const upload = new Upload({ client, params: { ...at, Body: hashed }, partSize: PART_BYTES, queueSize: PARTS_IN_FLIGHT });
  const [read, stored] = await Promise.allSettled([pipeline(source, hashed), stopReading(upload.done(), hashed)]);
  // The store's complaint is the cause when both fail, unless the source broke first and the store merely noticed.
  if (read.status === 'rejected' && !(stored.status === 'rejected' && hashed.errored === stored.reason)) throw read.reason;
  if (stored.status === 'rejected') throw stored.reason;
  return hashed.digest();
}

/** When the store refuses, the source has to be let go, or its sender would wait for ever. */
async function stopReading(upload: Promise<unknown>, stream: Readable): Promise<void> {
  try {
    await upload;
  } catch (error) {
    stream.destroy(error instanceof Error ? error : new Error(String(error)));
    throw error;
  }
}

async function get(client: S3Client, at: { Bucket: string; Key: string }): Promise<Readable> {
  const found = await unlessMissing(client.send(new GetObjectCommand(at)));
  if (!found) throw new ObjectMissing(at.Key);
  return found.Body as Readable;
}

async function unlessMissing<T>(request: Promise<T>): Promise<T | undefined> {
  try {
    return await request;
  } catch (error) {
    if (error instanceof S3ServiceException && error.$metadata.httpStatusCode === 404) return undefined;
    throw error;
  }
}
