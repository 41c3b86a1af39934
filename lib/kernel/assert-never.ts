/** Closes a switch over a union: a forgotten case does not compile. */
export function assertNever(value: never): never {
  throw new Error(`unexpected case: ${JSON.stringify(value)}`);
}
