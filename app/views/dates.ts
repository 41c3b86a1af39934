const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** `2026-11-14…` → `14 Nov 2026`: the UTC day, the same for every reader and on server and browser alike. */
export function formatDay(instant: string): string {
  const [year = '', month = '', day = ''] = instant.slice(0, 10).split('-');
  return `${Number(day)} ${months[Number(month) - 1] ?? month} ${year}`;
}

/** With the time where it matters: `14 Nov 2026, 09:41 UTC`. */
export const formatInstant = (instant: string): string => `${formatDay(instant)}, ${instant.slice(11, 16)} UTC`;
