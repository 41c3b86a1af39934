import { say } from './ground.mjs';

const LOOK_MS = 500;
const PAUSE_BEFORE_RESTART_MS = 300;
const RESTARTS_A_MINUTE = 10;

/**
 * Keeps the parts of the application up. Before everything is ready, a part that ends stops the
 * start; after that it is started again, unless it keeps ending.
 */
export class Supervisor {
  stopping = false;
  ready = false;
  #parts = new Set();
  #endings = [];
  #last = [];

  /** @param {() => void} onStop what to do first, whatever state the start was in */
  constructor(onStop) {
    this.onStop = onStop;
    // Stays installed: a second Ctrl-C must not kill us half-way down.
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void this.stop(0));
    // A killed npm or terminal sends no signal; that our parent changed is the only sign.
    const parent = process.ppid;
    setInterval(() => process.ppid !== parent && void this.stop(1), LOOK_MS).unref();
  }

  /** @param start starts a child; gives undefined when this copy has no such part */
  keep(start) {
    const part = this.stopping ? undefined : start();
    if (!part) return undefined;
    this.#parts.add(part);
    void part.ended.then((ending) => this.#ended(part, ending, start));
    return part;
  }

  /** For a piece of work that ends by itself; stopped with the rest when it has not. */
  once(start) {
    const part = this.stopping ? undefined : start();
    if (!part) return;
    this.#parts.add(part);
    void part.ended.then(() => this.#parts.delete(part));
  }

  /** For a server that is no child of ours: looks whether it is up, and brings it up again. */
  watch(name, { isUp, bringUp }) {
    setInterval(() => {
      if (this.stopping || isUp() || this.#endsTooOften(name)) return;
      say(`${name} ended; starting it again`);
      bringUp();
    }, LOOK_MS).unref();
  }

  /** For what the parts stand on: stopped after all of them. */
  addLast(stop) {
    this.#last.push(stop);
  }

  async stop(code) {
    if (this.stopping) return new Promise(() => {});
    this.stopping = true;
    say('stopping');
    this.onStop();
    await Promise.all([...this.#parts].map((part) => part.stop()));
    for (const stop of this.#last) stop();
    say('stopped');
    process.exit(code);
  }

  #ended(part, { name, code, signal }, start) {
    this.#parts.delete(part);
    if (this.stopping || this.#endsTooOften(name, `${code ?? signal}`)) return;
    say(`${name} ended (${code ?? signal}); starting it again`);
    setTimeout(() => this.keep(start), PAUSE_BEFORE_RESTART_MS);
  }

  #endsTooOften(name, how = 'gone') {
    const now = Date.now();
    this.#endings = [...this.#endings.filter((at) => now - at < 60_000), now];
    if (this.ready && this.#endings.length <= RESTARTS_A_MINUTE) return false;
    say(`${name} ended (${how})${this.ready ? ', as parts did too often within a minute' : ' before everything was ready'}, so all stops`);
    void this.stop(1);
    return true;
  }
}
