import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { resultSchema } from '@/lib/claims/result-schema';
import { runReproduce } from '@/lib/tools/reproduce/run';

const root = path.resolve(import.meta.dirname, '../../..');
const specimen = path.join(root, 'content/specimens/radiated-energy');

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'claim-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

async function run(...args: string[]) {
  let out = '';
  let err = '';
  const code = await runReproduce(args, { out: (text) => void (out += text), err: (text) => void (err += text), isTerminal: false });
  return { code, out, err };
}

/** A copy of the specimen whose sheet was changed. */
function changed(name: string, change: (sheet: { claims: Record<string, unknown>[] }) => void): string {
  const copy = path.join(folder, name);
  cpSync(specimen, copy, { recursive: true });
  const sheet = JSON.parse(readFileSync(path.join(copy, 'claim.json'), 'utf8')) as { claims: Record<string, unknown>[] };
  change(sheet);
  writeFileSync(path.join(copy, 'claim.json'), JSON.stringify(sheet));
  return copy;
}

describe('the reproduce command', () => {
  it('ends with 0 when every claim agrees, and prints a table with progress beside it', async () => {
    const { code, out, err } = await run(specimen);
    expect(code).toBe(0);
    expect(out).toMatch(/C1 {2}radiated-energy: agrees\n {2}claimed +recomputed ± U +T +verdict\n {2}0\.0399/);
    expect(out).toContain('All claims agree.');
    expect(err).toContain('reading A');
  });

  it('ends with 1 when some claim does not agree', async () => {
    const { code, out } = await run(changed('differs', (sheet) => Object.assign(sheet.claims[0] ?? {}, { claimed: '0.0484' })), '--json');
    expect(code).toBe(1);
    expect(JSON.parse(out)).toMatchObject({ format: 'counterfoil-result/1', claims: [{ verdict: 'differs' }] });
  });

  it('ends with 2 when the sheet cannot be read, with every problem as one document', async () => {
    const bad = changed('bad', (sheet) => Object.assign(sheet.claims[0] ?? {}, { claimed: '0,04', noise: 'X' }));
    const { code, out } = await run(bad, '--json');
    expect(code).toBe(2);
    expect((JSON.parse(out) as { problems: { where: string }[] }).problems.map((problem) => problem.where)).toEqual(['/claims/0/noise', '/claims/0/claimed']);
    const plain = await run(bad);
    expect(plain).toMatchObject({ code: 2, out: '' });
    expect(plain.err).toContain('2 things have to be mended before this can run:');
  });

  it('ends with 2 for a wrong call, and says how it is called', async () => {
    for (const args of [[], ['a', 'b'], [specimen, '--verbose']]) expect(await run(...args)).toMatchObject({ code: 2, out: '' });
    expect((await run()).err).toContain('expected reproduce PATH [--json] [--explain]');
  });

  it('looks for another reading only when it is asked to, and only of claims that do not agree', async () => {
    const misread = 'content/specimens/electromagnetic-twin';
    const searched = JSON.parse((await run(misread, '--json', '--explain')).out) as { claims: { id: string; verdict: string; search?: { sentence: string } }[] };
    expect(resultSchema.safeParse(searched).error).toBeUndefined();
    expect(searched.claims.filter(({ search }) => search !== undefined).map(({ id, verdict }) => [id, verdict])).toEqual([['C2', 'differs']]);
    expect((await run(misread, '--json')).out).not.toContain('"search"');
    const told = (await run(misread, '--explain')).out;
    expect(told).toContain('May be coincidence: the number is carried on from 10000 G with B instead of B²');
    expect(told).toContain('Search: ');
  });

  it('gives the same bytes on every run, and they fit the published schema', async () => {
    const [first, second] = [await run(specimen, '--json'), await run(specimen, '--json')];
    expect(first.out).toBe(second.out);
    expect(resultSchema.safeParse(JSON.parse(first.out)).error).toBeUndefined();
  });

  it('as a program of its own puts one JSON document on standard output and nothing else', () => {
    const program = spawnSync(process.execPath, ['--import', 'tsx', 'lib/tools/reproduce.ts', specimen, '--json'], { cwd: root, encoding: 'utf8' });
    expect(program.status).toBe(0);
    expect(resultSchema.safeParse(JSON.parse(program.stdout)).error).toBeUndefined();
  });
});
