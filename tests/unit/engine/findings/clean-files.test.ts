import { createHash } from 'node:crypto';
import { createReadStream, existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { centreDriftFindings } from '@/lib/engine/findings/centre-drift';
import { recordFindings } from '@/lib/engine/findings/record-findings';
import { catalogue } from '@/lib/pipeline/catalogue';
import { HashedFiles } from '@/lib/pipeline/hashed-files';
import { readInputs } from '@/lib/pipeline/read-inputs';

const sha256 = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};

async function codesOf(folder: string): Promise<string[]> {
  const sheet = parseClaimSheet(readFileSync(join(folder, 'claim.json')), catalogue);
  if (!sheet.ok) throw new Error(JSON.stringify(sheet.error));
  const inputs = await readInputs(sheet.value, new HashedFiles((name) => createReadStream(join(folder, name)), sha256), () => undefined);
  if (!inputs.ok) throw new Error(JSON.stringify(inputs.error));
  const ofInputs = [...inputs.value.waveforms.values(), ...inputs.value.noise.values()].flatMap(({ findings }) => findings);
  const ofRecords = [...inputs.value.waveforms.values()].flatMap(({ input }) => {
    if (input === null) return [];
    const drift = input.content.kind === 'modes' ? centreDriftFindings(input.axis, input.content.modes, input.name) : [];
    return [...recordFindings(input), ...drift];
  });
  return [...ofInputs, ...ofRecords].map(({ code, text }) => `${code} ${text}`);
}

const sheetsIn = (folder: string): string[] => (existsSync(folder) ? readdirSync(folder).map((name) => join(folder, name)).filter((path) => existsSync(join(path, 'claim.json')) && existsSync(join(path, files(path)))) : []);
/** A sheet whose files are arrays is read elsewhere. */
const files = (path: string): string => {
  const { waveforms } = JSON.parse(readFileSync(join(path, 'claim.json'), 'utf8')) as { waveforms: Readonly<Record<string, { file?: string; files?: Readonly<Record<string, string>> }>> };
  const [first] = Object.values(waveforms);
  return first?.file ?? Object.values(first?.files ?? {})[0] ?? 'claim.json';
};

/** Made with a fault of the file, which is the point of them. */
const faulty: Readonly<Record<string, RegExp>> = { 'content/specimens/recoil-of-two-to-one': /mirror-broken/, 'content/specimens/typed-by-hand': /curve-identity/ };

describe('files whose fault lies in themselves', () => {
  it.each(Object.entries(faulty))('of %s show it, and nothing else', async (folder, fault) => {
    const found = await codesOf(folder);
    expect(found.length).toBeGreaterThan(0);
    for (const text of found) expect(text).toMatch(fault);
  });
});

/** What a file must not be accused of. The mistakes of these sheets lie in what they claim. */
describe('files without fault', () => {
  it.each([...sheetsIn('content/specimens').filter((folder) => !(folder in faulty)), ...sheetsIn('../shared/reference/sheets')])('of %s show nothing by themselves', async (folder) => {
    expect(await codesOf(folder)).toEqual([]);
  });
});
