export const ROOT3 = Math.sqrt(3);

/** Standard uncertainty of a rectangle (JCGM 100: u = half-width/√3). */
export const standardOf = (halfWidth: number): number => halfWidth / ROOT3;

/** Relative size below which no computation in double precision is trusted (engine design): no rerun shows it. */
export const LEAST = 1e-13;
