import { webEnv } from '@/lib/env';
import type { ObjectStore } from '@/lib/storage/object-store';
import { createS3Store } from '@/lib/storage/s3-store';

const shared = globalThis as { counterfoilStore?: ObjectStore };

/** Where this process keeps bytes. */
export function fileStore(): ObjectStore {
  shared.counterfoilStore ??= createS3Store(webEnv());
  return shared.counterfoilStore;
}
