/** Class names that may be absent, joined. */
export const classes = (...names: readonly (string | false | null | undefined)[]): string => names.filter(Boolean).join(' ');
