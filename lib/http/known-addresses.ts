import { DOORS } from '@/lib/policy/doors';
import { REVIEW_DOORS } from '@/lib/policy/review-doors';

/** The addresses of the interface, read off the table of doors. */
const PREFIX = '/api/v1/';
type Address = { readonly parts: readonly string[]; readonly methods: readonly string[] };

const addresses: readonly Address[] = (() => {
  const found = new Map<string, string[]>();
  for (const door of Object.keys({ ...DOORS, ...REVIEW_DOORS })) {
    const [method = '', path = ''] = door.split(' ');
    if (path.startsWith(PREFIX)) found.set(path, [...(found.get(path) ?? []), method, ...(method === 'GET' ? ['HEAD'] : [])]);
  }
  return [...found].map(([path, methods]) => ({ parts: path.split('/'), methods }));
})();

/** The methods that an address under /api/v1 answers; none when it is no address of ours. */
export function methodsAt(path: string): readonly string[] | 'not-ours' {
  if (path !== '/api' && path !== '/api/' && path !== '/api/v1' && !path.startsWith(PREFIX)) return 'not-ours';
  if (!isWellFormed(path)) return [];
  const parts = path.split('/');
  const fits = ({ parts: wanted }: Address): boolean => wanted.length === parts.length && wanted.every((part, i) => (part.startsWith('{') ? parts[i] !== '' : part === parts[i]));
  // A word such as `failed` goes before a place that takes any id.
  return addresses.filter(fits).toSorted((a, b) => literals(b) - literals(a))[0]?.methods ?? [];
}

const literals = ({ parts }: Address): number => parts.filter((part) => !part.startsWith('{')).length;

function isWellFormed(path: string): boolean {
  try {
    decodeURIComponent(path);
    return true;
  } catch {
    return false;
  }
}
