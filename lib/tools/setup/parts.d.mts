export interface Part {
  readonly name: string;
  readonly pid: number;
  readonly ended: Promise<{ readonly name: string; readonly code: number | null; readonly signal: string | null }>;
  stop(patienceMs?: number): Promise<void>;
}
type Environment = Readonly<Record<string, string | undefined>>;
type Write = (text: string) => void;
export function startWeb(env: Environment, options: { host?: string; port: number; dev?: boolean; write?: Write }): Part;
export function startScript(name: string, file: string, env: Environment, write?: Write): Part | undefined;
export function startWorker(env: Environment, write?: Write): Part | undefined;
export function startSigner(env: Environment, write?: Write): Part | undefined;
export function waitUntilReady(url: string, part: Part, patienceMs?: number): Promise<void>;
