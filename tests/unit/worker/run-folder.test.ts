import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { spawnSync } from 'node:child_process';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { expect, it } from 'vitest';
import { sweepRunFolders } from '@/lib/worker/run-folder';

it('removes what dead workers left on the disk, and nothing of the living or of others', async () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'counterfoil-sweep-'));
  const dead = spawnSync(process.execPath, ['-e', '']).pid;
  for (const name of [`counterfoil-run-${dead}-abc`, `counterfoil-run-${process.pid}-abc`, `counterfoil-run-${process.ppid}-abc`, 'counterfoil-run-xyz', `other-${dead}-abc`]) {
    mkdirSync(path.join(folder, name));
    writeFileSync(path.join(folder, name, 'input.txt'), '1');
  }
  expect(await sweepRunFolders(folder)).toBe(1);
  expect(readdirSync(folder)).not.toContain(`counterfoil-run-${dead}-abc`);
  expect(readdirSync(folder)).toHaveLength(4);
  rmSync(folder, { recursive: true });
});
