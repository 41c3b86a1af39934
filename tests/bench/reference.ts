import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';

/** The reference script as a child that answers one request a line. */
export interface Reference {
  readonly ask: <T>(request: object) => Promise<T>;
  readonly close: () => void;
}

export function openReference(name = 'reference.py'): Reference {
  const script = fileURLToPath(new URL(name, import.meta.url));
  const child = spawn('/usr/bin/python3', [script], { stdio: ['pipe', 'pipe', 'inherit'] });
  const answers = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
  const ask = async <T>(request: object): Promise<T> => {
    child.stdin.write(`${JSON.stringify(request)}\n`);
    const { value, done } = await answers.next();
    if (done) throw new Error('the reference script ended without an answer');
    return JSON.parse(String(value)) as T;
  };
  return { ask, close: () => child.stdin.end() };
}
