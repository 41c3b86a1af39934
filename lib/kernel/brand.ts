declare const brand: unique symbol;

/** A type only its own constructor can make: `SubmissionId`, `Sha256`, `Grant`. */
export type Brand<T, Name extends string> = T & { readonly [brand]: Name };
