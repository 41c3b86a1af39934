/** A whole page load: what was fetched for one person, or before a right was gained, must not linger. */
export const loadAnew = (path: string): void => document.location.assign(path);
