import { spawn, spawnSync } from 'node:child_process';
import { ROOT, SetupError, isRoot } from './ground.mjs';

const running = new Set();

/** Runs one step with our own output; refuses to go on when it does not end well. */
export async function runStep(command, args, { env = process.env, quiet = false } = {}) {
  const step = spawn(command, args, { cwd: ROOT, env, stdio: ['ignore', quiet ? 'ignore' : 'inherit', 'inherit'] });
  running.add(step);
  const ended = await new Promise((resolve) => {
    step.once('error', (error) => resolve(error.message));
    step.once('exit', (code, signal) => resolve(code ?? signal));
  });
  running.delete(step);
  if (ended !== 0) throw new SetupError(`${[command, ...args.slice(0, 3)].join(' ')} ended with ${ended}`);
}

/** A step in progress would keep us alive after Ctrl-C. */
export const stopSteps = () => running.forEach((step) => step.kill('SIGTERM'));

/** `npm ci` inside `npm start` must not inherit the outer command's npm_config_* and npm_lifecycle_*. */
export const withoutNpmVariables = (env) => Object.fromEntries(Object.entries(env).filter(([name]) => !/^npm_/i.test(name)));

const idOf = (...args) => spawnSync('id', args, { encoding: 'utf8' }).stdout.trim();
export const userName = (uid) => idOf('-nu', String(uid)) || String(uid);
export const userIds = (name) => ({ uid: Number(idOf('-u', name)), gid: Number(idOf('-g', name)) });

/** A server program never runs as root, never in our folder, and sees none of our variables. */
export function runAs(user, command, args, options = {}) {
  const env = { PATH: '/usr/sbin:/usr/bin:/sbin:/bin', LC_ALL: 'C.UTF-8', TZ: 'UTC', ...options.env };
  const [program, rest] = isRoot ? ['runuser', ['-u', user, '--', command, ...args]] : [command, args];
  return spawnSync(program, rest, { cwd: '/', encoding: 'utf8', ...options, env });
}
