export function freePort(first: number, taken?: Set<number>): Promise<number>;
