export interface RunningPostgres {
  readonly port: number;
  readonly adopted: boolean;
  readonly data: string;
  /** The cluster's superuser, on the database `postgres`. */
  readonly adminUrl: string;
  stop(): void;
}
export function ensurePostgres(): unknown;
export function startPostgres(options: { folder: string; password: string; firstPort?: number; fast?: boolean }): Promise<RunningPostgres>;
export function roleUrl(role: string, password: string, port: number, database: string): string;
export function stopPostgresIn(folder: string): void;
