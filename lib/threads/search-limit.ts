/** The search for other readings is bounded by what it counts; this is the net under it. */
const SEARCH_LIMIT_MS = 120_000;

/** Begins to count when it is first asked. */
export function searchLimit(limitMs = SEARCH_LIMIT_MS, now: () => number = () => performance.now()): { readonly endedBy: () => string | null } {
  let began: number | null = null;
  return { endedBy: () => (now() - (began ??= now()) > limitMs ? 'the time for the search was over' : null) };
}
