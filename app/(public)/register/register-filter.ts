/** The register's filters live in the address, so that a search can be sent to somebody. */
export interface Filter {
  readonly text?: string | undefined;
  readonly quantity?: string | undefined;
  readonly verdict?: string | undefined;
}
export type SearchParams = Readonly<Record<string, string | string[] | undefined>>;

const longest = 200;
const one = (value: string | string[] | undefined): string | undefined => {
  const first = Array.isArray(value) ? value[0] : value;
  const trimmed = first?.trim().slice(0, longest);
  return trimmed ? trimmed : undefined;
};

export const parseFilter = (params: SearchParams): Filter => ({ text: one(params['text']), quantity: one(params['quantity']), verdict: one(params['verdict']) });

export const isFiltered = (filter: Filter): boolean => Object.values(filter).some(Boolean);

/** The inverse of `parseFilter`. */
export function registerHref(filter: Filter): string {
  const query = new URLSearchParams(Object.entries(filter).flatMap(([name, value]) => (value ? [[name, value]] : [])));
  return query.size > 0 ? `/register?${query}` : '/register';
}
