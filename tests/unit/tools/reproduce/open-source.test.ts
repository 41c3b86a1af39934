import { execFileSync } from 'node:child_process';
import { mkdtempSync, mkdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openSource } from '@/lib/tools/reproduce/open-source';

let root = '';
beforeAll(() => {
  root = mkdtempSync(path.join(tmpdir(), 'claim-'));
  mkdirSync(path.join(root, 'claim'));
  writeFileSync(path.join(root, 'claim', 'claim.json'), '{}');
  writeFileSync(path.join(root, 'claim', 'other.json'), '[]');
  writeFileSync(path.join(root, 'claim', 'a.txt'), '0 1\n1 2\n');
  writeFileSync(path.join(root, 'secret.txt'), 'secret');
  symlinkSync('../secret.txt', path.join(root, 'claim', 'out.txt'));
  symlinkSync('a.txt', path.join(root, 'claim', 'in.txt'));
  execFileSync('mkfifo', [path.join(root, 'claim', 'pipe.txt')]);
});
afterAll(() => rmSync(root, { recursive: true }));

async function sourceAt(...parts: string[]) {
  const source = await openSource(path.join(root, ...parts));
  if (!source.ok) throw new Error(source.error[0]?.saw);
  return source.value;
}

async function textOf(parts: AsyncIterable<Uint8Array>): Promise<string> {
  let text = '';
  for await (const part of parts) text += new TextDecoder().decode(part);
  return text;
}

describe('a claim on the disk', () => {
  it('is a folder with claim.json, or any sheet file in a folder', async () => {
    const folder = await sourceAt('claim');
    expect(new TextDecoder().decode(folder.sheetJson)).toBe('{}');
    expect(await textOf(folder.openFile('a.txt'))).toBe('0 1\n1 2\n');
    expect(await textOf(folder.openFile('in.txt'))).toBe('0 1\n1 2\n');
    expect(new TextDecoder().decode((await sourceAt('claim', 'other.json')).sheetJson)).toBe('[]');
  });

  it('gives nothing that a link fetches from outside its folder', async () => {
    await expect(textOf((await sourceAt('claim')).openFile('out.txt'))).rejects.toThrow('a link that leads out of the folder');
  });

  it('does not wait for a pipe or read a folder as a file', async () => {
    const folder = await sourceAt('claim');
    await expect(textOf(folder.openFile('pipe.txt'))).rejects.toThrow('something that is not a plain file');
    await expect(textOf(folder.openFile('.'))).rejects.toThrow('something that is not a plain file');
  });

  it('is refused when there is none', async () => {
    for (const [where, saw] of [[path.join(root, 'nowhere'), 'nothing at this path'], [root, 'no claim.json in the folder'], [path.join(root, 'claim', 'pipe.txt'), 'neither a file nor a folder']] as const) {
      const source = await openSource(where);
      expect(source).toMatchObject({ ok: false, error: [{ where, saw }] });
    }
  });
});
