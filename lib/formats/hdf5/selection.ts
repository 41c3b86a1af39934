/** A dataset's path with what is picked of it: `/a/b`, `/a/b[0,:]`, `/table[re]`. */
export interface Selection {
  readonly path: string;
  /** One entry a dimension; null keeps it whole. Null when nothing is picked. */
  readonly indices: readonly (number | null)[] | null;
  /** A field of records. */
  readonly field: string | null;
}

export function parseSelection(text: string): Selection {
  const found = /^(.+?)\[([^[\]]*)\]$/.exec(text);
  const [path, inside] = found ? [found[1]!, found[2]!.trim()] : [text, null];
  const whole = path.startsWith('/') ? path : `/${path}`;
  if (inside === null) return { path: whole, indices: null, field: null };
  const parts = inside.split(',').map((part) => part.trim());
  if (parts.every((part) => /^(\d{1,12}|:)$/.test(part))) return { path: whole, indices: parts.map((part) => (part === ':' ? null : Number(part))), field: null };
  return { path: whole, indices: null, field: inside };
}
