import { spawn } from 'node:child_process';
import { ROOT } from './ground.mjs';

/**
 * A long-running part of the application in a process group of its own: Ctrl-C reaches only the
 * supervisor, which stops the parts in order.
 */
export function startChild(name, args, env, write = (text) => process.stdout.write(text)) {
  const child = spawn(process.execPath, args, {
    cwd: ROOT,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: { ...env, SUPERVISED: '1' },
  });
  for (const stream of [child.stdout, child.stderr]) forwardLines(stream, (line) => write(`[${name}] ${line}\n`));
  const ended = new Promise((resolve) => child.once('exit', (code, signal) => resolve({ name, code, signal })));
  return { name, pid: child.pid, ended, stop: (patienceMs = 8000) => stop(child, ended, patienceMs) };
}

async function stop(child, ended, patienceMs) {
  if (child.exitCode !== null || child.signalCode !== null) return;
  signalGroup(child.pid, 'SIGTERM');
  const lastWord = setTimeout(() => signalGroup(child.pid, 'SIGKILL'), patienceMs);
  await ended;
  clearTimeout(lastWord);
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch {
    // it ended by itself in the meantime
  }
}

function forwardLines(stream, write) {
  let rest = '';
  stream.setEncoding('utf8');
  stream.on('data', (text) => {
    const lines = (rest + text).split('\n');
    rest = lines.pop();
    lines.forEach(write);
  });
  stream.on('end', () => rest && write(rest));
}
