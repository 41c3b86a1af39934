import { mkdirSync } from 'node:fs';
import S3rver from 's3rver';
import accounts from 's3rver/lib/models/account.js';

export interface ObjectStoreFake {
  readonly endpoint: string;
  stop(): Promise<void>;
}

/**
 * Speaks the S3 protocol over a folder, on loopback. For demonstration and tests only: it
 * serves any local program, and promises nothing when the machine stops in the middle of a write.
 */
export async function startObjectStoreFake(options: {
  folder: string;
  port?: number;
  accessKeyId: string;
  secretAccessKey: string;
}): Promise<ObjectStoreFake> {
  mkdirSync(options.folder, { recursive: true });
  accounts.DUMMY_ACCOUNT.revokeAccessKey('S3RVER');
  accounts.DUMMY_ACCOUNT.createKeyPair(options.accessKeyId, options.secretAccessKey);
  const server = new S3rver({
    address: '127.0.0.1',
    port: options.port ?? 0,
    silent: true,
    directory: options.folder,
    vhostBuckets: false,
  });
  const { port } = await server.run();
  return {
    endpoint: `http://127.0.0.1:${port}`,
    async stop() {
      server.httpServer?.closeAllConnections();
      await server.close();
    },
  };
}
