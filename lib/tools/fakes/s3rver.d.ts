declare module 's3rver' {
  import type { Server } from 'node:http';
  import type { AddressInfo } from 'node:net';

  export default class S3rver {
    constructor(options: { address?: string; port?: number; silent?: boolean; directory?: string; vhostBuckets?: boolean });
    run(): Promise<AddressInfo>;
    close(): Promise<void>;
    httpServer?: Server;
  }
}

declare module 's3rver/lib/models/account.js' {
  interface Account {
    createKeyPair(accessKeyId: string, secretAccessKey: string): void;
    revokeAccessKey(accessKeyId: string): void;
  }
  const models: { DUMMY_ACCOUNT: Account };
  export default models;
}
