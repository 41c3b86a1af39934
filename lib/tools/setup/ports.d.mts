export function freePort(first: number): Promise<number>;
export function reservePort(first: number, last?: number): Promise<{ readonly port: number; release(): Promise<void> }>;
