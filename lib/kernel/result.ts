/**
 * The kernel: the few ideas every room shares. It imports nothing, so that nothing
 * can climb into it. Below the stairs an expected failure is a value, not a throw.
 */
export type Result<T, E> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: E };

export const ok = <T>(value: T): Result<T, never> => ({ ok: true, value });
export const err = <E>(error: E): Result<never, E> => ({ ok: false, error });

/** All values, or every error: a parser reports each problem, never only the first. */
export function collect<T, E>(results: readonly Result<T, readonly E[]>[]): Result<T[], E[]> {
  const errors = results.flatMap((r) => (r.ok ? [] : r.error));
  if (errors.length > 0) return err(errors);
  return ok(results.flatMap((r) => (r.ok ? [r.value] : [])));
}
