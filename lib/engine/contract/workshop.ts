/**
 * What measurements of one run may keep for each other: spectra of waveforms that a search asks for
 * again and again. Opaque to whoever hands it on; without one every measurement begins anew.
 */
export class Workshop {
  private readonly kept = new Map<string, unknown>();

  once<T>(key: string, make: () => T): T {
    if (!this.kept.has(key)) this.kept.set(key, make());
    return this.kept.get(key) as T;
  }
}
