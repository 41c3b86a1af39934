import type { StructureView } from './structure-schema';

const mostBytes = 16 * 2 ** 20;

/** What files were found to hold, by their hash, in bounded memory: the oldest makes room. */
export class KnownStructures {
  private readonly views = new Map<string, { readonly view: StructureView; readonly bytes: number }>();
  private bytes = 0;

  constructor(private readonly most = mostBytes) {}

  get(key: string): StructureView | undefined {
    return this.views.get(key)?.view;
  }

  keep(key: string, view: StructureView): void {
    this.drop(key);
    const bytes = Buffer.byteLength(JSON.stringify(view));
    if (bytes > this.most) return;
    this.views.set(key, { view, bytes });
    this.bytes += bytes;
    for (const oldest of this.views.keys()) {
      if (this.bytes <= this.most) return;
      this.drop(oldest);
    }
  }

  private drop(key: string): void {
    this.bytes -= this.views.get(key)?.bytes ?? 0;
    this.views.delete(key);
  }
}
