import { say } from './ground.mjs';

const PARENT_CHECK_MS = 500;

/** Keeps the parts of the application together: when one ends, or we are asked to, all end. */
export class Supervisor {
  stopping = false;
  #parts = [];
  #last = [];

  /** @param {() => void} onStop what to do first, whatever state the start was in */
  constructor(onStop) {
    this.onStop = onStop;
    // Stays installed: a second Ctrl-C must not kill us half-way down.
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void this.stop(0));
    // A killed npm or terminal sends no signal; that our parent changed is the only sign.
    const parent = process.ppid;
    setInterval(() => process.ppid !== parent && void this.stop(1), PARENT_CHECK_MS).unref();
  }

  /** @param part a child, or undefined when this copy has no such part */
  add(part) {
    if (!part) return part;
    if (this.stopping) void part.stop();
    this.#parts.push(part);
    void part.ended.then(({ name, code, signal }) => {
      if (this.stopping) return;
      say(`${name} ended (${code ?? signal}), so everything stops`);
      void this.stop(1);
    });
    return part;
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
    await Promise.all(this.#parts.map((part) => part.stop()));
    for (const stop of this.#last) stop();
    say('stopped');
    process.exit(code);
  }
}
