import { spawnSync } from 'node:child_process';
import { ROOT, SetupError, isRoot } from './ground.mjs';

/** Runs a command with our own output and refuses to go on when it does not end well. */
export function must(command, args, options = {}) {
  const done = spawnSync(command, args, { stdio: 'inherit', cwd: ROOT, ...options });
  if (done.error) throw new SetupError(`${command}: ${done.error.message}`);
  if (done.status !== 0)
    throw new SetupError(`${command} ${args.slice(0, 3).join(' ')} ended with ${done.status ?? done.signal}`);
}

/** `npm ci` inside `npm start` must not inherit the outer command's npm_config_* and npm_lifecycle_*. */
export function withoutNpmVariables(env) {
  return Object.fromEntries(Object.entries(env).filter(([name]) => !/^npm_/i.test(name)));
}

const idOf = (...args) => spawnSync('id', args, { encoding: 'utf8' }).stdout.trim();
export const userName = (uid) => idOf('-nu', String(uid)) || String(uid);
export const userIds = (name) => ({ uid: Number(idOf('-u', name)), gid: Number(idOf('-g', name)) });

/** A server program never runs as root, never in our folder, and sees none of our variables. */
export function runAs(user, command, args, options = {}) {
  const env = { PATH: '/usr/sbin:/usr/bin:/sbin:/bin', LC_ALL: 'C.UTF-8', TZ: 'UTC', ...options.env };
  const [program, rest] = isRoot ? ['runuser', ['-u', user, '--', command, ...args]] : [command, args];
  return spawnSync(program, rest, { cwd: '/', encoding: 'utf8', ...options, env });
}
