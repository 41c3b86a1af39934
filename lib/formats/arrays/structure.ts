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

export const structureLimits = { entries: 2000, depth: 32, valueLength: 200 };
