export interface Spent {
  readonly seconds: number;
  /** Processor time of the whole process: other programs on the machine do not enter. */
  readonly cpuSeconds: number;
}

const cpuSeconds = (): number => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
};

export async function timed<T>(work: () => T | Promise<T>): Promise<Spent & { readonly value: T }> {
  const started = performance.now();
  const spent = cpuSeconds();
  const value = await work();
  return { value, seconds: (performance.now() - started) / 1000, cpuSeconds: cpuSeconds() - spent };
}

/** The one that took least processor time of several: a shared machine only ever adds. */
export const quickest = <T extends Spent>(runs: readonly T[]): T =>
  runs.reduce((best, run) => (run.cpuSeconds < best.cpuSeconds ? run : best));
