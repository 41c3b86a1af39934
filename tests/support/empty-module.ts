/** Stands in for `server-only`, whose real module refuses to load outside a server component. */
export {};
