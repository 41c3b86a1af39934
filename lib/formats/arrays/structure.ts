/** What a file of arrays holds, for a person who says which is which. No number of an array is in it. */
export interface ArrayStructure {
  readonly format: 'npy' | 'npz' | 'hdf5';
  readonly entries: readonly StructureEntry[];
  /** More was there than is listed. */
  readonly cut: boolean;
}

export interface StructureEntry {
  readonly path: string;
  readonly kind: 'group' | 'dataset';
  /** Null for groups and for what cannot be read. */
  readonly shape: readonly number[] | null;
  readonly complex: boolean;
  /** The stored type in words; empty for a group. */
  readonly type: string;
  readonly attributes: readonly { readonly name: string; readonly value: string }[];
  /** Why it cannot be used; null when it can. */
  readonly refusal: string | null;
}

export const structureLimits = { entries: 2000, depth: 32, valueLength: 200, pathLength: 1000, bytes: 2 ** 20 };

/** Entries as they are found, until they are as many, or as long, as an answer may be. */
export class Listing {
  readonly entries: StructureEntry[] = [];
  private bytes = 0;
  cut = false;

  get full(): boolean {
    return this.entries.length >= structureLimits.entries || this.bytes >= structureLimits.bytes;
  }

  /** A path that is cut short would name nothing: what has too long a one is left out. */
  takes(path: string): boolean {
    if (path.length <= structureLimits.pathLength) return true;
    this.cut = true;
    return false;
  }

  add(entry: StructureEntry): void {
    const bytes = new TextEncoder().encode(JSON.stringify(entry)).length + 1;
    if (this.bytes + bytes > structureLimits.bytes) {
      this.bytes = structureLimits.bytes;
      this.cut = true;
      return;
    }
    this.bytes += bytes;
    this.entries.push(entry);
  }
}
