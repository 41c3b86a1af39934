import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import { SetupError, isRoot, say } from './ground.mjs';

/** Installs Debian packages, or says the one command to run when this user may not. */
export function installFromDebian(packages, missing) {
  const prefix = isRoot ? [] : passwordlessSudo();
  if (!prefix) throw new SetupError(`${missing} is missing and this user may not install it. ${oneCommand(packages)}`);
  const apt = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-q', '-o', 'DPkg::Lock::Timeout=300'];
  const run = (...args) => spawnSync(apt[0], [...apt.slice(1), ...args], { stdio: 'inherit' }).status === 0;
  const install = () => run('install', '-y', '--no-install-recommends', ...packages);
  say(`installing ${packages.join(' ')} from Debian`);
  if (install()) return;
  run('update');
  if (!install()) throw new SetupError(`apt-get did not install ${packages.join(' ')}. ${oneCommand(packages)}`);
}

export const CHROMIUM = '/usr/bin/chromium';

export function ensureChromium() {
  if (!fs.existsSync(CHROMIUM)) installFromDebian(['chromium'], 'Chromium (for the browser tests)');
}

const passwordlessSudo = () => (spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0 ? ['sudo', '-n'] : null);

const oneCommand = (packages) => `Run once as root:\n  apt-get update && apt-get install -y --no-install-recommends ${packages.join(' ')}`;
