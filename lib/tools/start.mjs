/** `npm start` and `npm run dev`: from a bare machine to a running application, and down again. */
import fs from 'node:fs';
import path from 'node:path';
import { stopSteps } from './setup/commands.mjs';
import { ensureDependencies } from './setup/dependencies.mjs';
import { DATA, report, say } from './setup/ground.mjs';
import { holderOf, take } from './setup/lock.mjs';
import { ensureWritable } from './setup/ownership.mjs';
import { Supervisor } from './setup/supervisor.mjs';
import { startDemo, startForTeam } from './setup/application.mjs';

const PID_FILE = path.join(DATA, 'start.pid');
const READY_FILE = path.join(DATA, 'ready.txt');

const dev = process.argv.includes('--dev');
const supervisor = new Supervisor(() => {
  stopSteps();
  fs.rmSync(READY_FILE, { force: true });
  if (holderOf(PID_FILE) === process.pid) fs.rmSync(PID_FILE, { force: true });
});

try {
  ensureWritable();
  if (take(PID_FILE)) await start();
  else sayItRuns();
} catch (error) {
  if (!supervisor.stopping) report(error);
  await supervisor.stop(1);
}

async function start() {
  const begun = Date.now();
  await ensureDependencies();
  // A database of one's own in the environment means: this is no demonstration.
  const ready = process.env.DATABASE_URL ? await startForTeam(supervisor) : await startDemo(supervisor, { dev });
  supervisor.ready = true;
  fs.writeFileSync(READY_FILE, ready);
  say(`ready after ${((Date.now() - begun) / 1000).toFixed(1)} s\n\n${ready}\n`);
}

function sayItRuns() {
  const running = `Counterfoil already runs from this folder, as process ${holderOf(PID_FILE)}.`;
  say(fs.existsSync(READY_FILE) ? `${running}\n\n${fs.readFileSync(READY_FILE, 'utf8')}\n` : `${running} It is not ready yet.`);
  process.exit(0);
}
