/** Why a path that a sheet or an archive names is refused, in words; null when it stays inside its folder. */
export function pathFault(path: string): string | null {
  if (path === '') return 'an empty path';
  if (path.length > 300) return 'a path of more than 300 characters';
  if (/[\u0000-\u001f\u007f]/.test(path)) return 'a path with control characters';
  const named = JSON.stringify(path.length > 60 ? `${path.slice(0, 60)}…` : path);
  if (path.includes('\\')) return `${named} with a backslash`;
  if (path.startsWith('/') || /^[A-Za-z]:/.test(path)) return `the absolute path ${named}`;
  const parts = path.split('/');
  if (parts.includes('..')) return `${named}, which climbs out of the folder`;
  if (parts.includes('.') || parts.includes('')) return `${named} with an empty or "." part`;
  return null;
}
