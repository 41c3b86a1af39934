import { randomBytes } from 'node:crypto';
import { chmodSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { migrateDatabase } from '@/lib/tools/database/migrate-database';
import { ROLES, type RoleUrls } from '@/lib/tools/database/roles';
import { roleUrl, startPostgres, stopPostgresIn, type RunningPostgres } from '@/lib/tools/setup/postgres.mjs';

/** What a test file needs to clone the template: addresses are built from these. */
export interface ClusterAddress {
  readonly adminUrl: string;
  readonly port: number;
  readonly password: string;
}

declare module 'vitest' {
  export interface ProvidedContext {
    cluster: ClusterAddress;
  }
}

const PREFIX = 'counterfoil-test-';
const OWNER = 'owner.pid';

export const TEMPLATE = 'counterfoil_template';

export function urlsFor(cluster: ClusterAddress, database: string): RoleUrls {
  const of = (role: string): string => roleUrl(role, cluster.password, cluster.port, database);
  return { owner: of(ROLES.owner), web: of(ROLES.web), worker: of(ROLES.worker), signer: of(ROLES.signer) };
}

/** One throw-away cluster for all projects of a run; the last project that leaves stops it. */
const shared = globalThis as { counterfoilCluster?: { users: number; started: Promise<Started> } };
interface Started {
  readonly address: ClusterAddress;
  readonly postgres: RunningPostgres;
  readonly folder: string;
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  shared.counterfoilCluster ??= { users: 0, started: start() };
  shared.counterfoilCluster.users++;
  project.provide('cluster', (await shared.counterfoilCluster.started).address);
  return leave;
}

async function start(): Promise<Started> {
  sweepLeftBehind();
  const folder = mkdtempSync(path.join(tmpdir(), PREFIX));
  writeFileSync(path.join(folder, OWNER), String(process.pid));
  chmodSync(folder, 0o711); // started by root, the server's own user has to pass through
  const password = randomBytes(18).toString('base64url');
  const postgres = await startPostgres({ folder, password, firstPort: 55100, fast: true });
  const address = { adminUrl: postgres.adminUrl, port: postgres.port, password };
  const root = fileURLToPath(new URL('../..', import.meta.url));
  try {
    await migrateDatabase(urlsFor(address, TEMPLATE), { adminUrl: postgres.adminUrl, root });
  } catch (error) {
    postgres.stop();
    throw error;
  }
  return { address, postgres, folder };
}

/** A run that was killed could not stop its cluster; the next one does. */
function sweepLeftBehind(): void {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(PREFIX))) {
    const folder = path.join(tmpdir(), name);
    if (!isOrphan(folder)) continue;
    stopPostgresIn(folder);
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Its maker is known and dead; a folder without that note, or another user's, is left alone. */
function isOrphan(folder: string): boolean {
  try {
    process.kill(Number(readFileSync(path.join(folder, OWNER), 'utf8')), 0);
    return false;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'ESRCH';
  }
}

async function leave(): Promise<void> {
  const cluster = shared.counterfoilCluster;
  if (!cluster || --cluster.users > 0) return;
  delete shared.counterfoilCluster;
  const { postgres, folder } = await cluster.started;
  postgres.stop();
  rmSync(folder, { recursive: true, force: true });
}
