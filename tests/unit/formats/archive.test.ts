import { Uint8ArrayReader, Uint8ArrayWriter, ZipWriter, TextReader } from '@zip.js/zip.js';
import { describe, expect, it } from 'vitest';
import { archiveLimits, openArchive, type ArchiveLimits } from '@/lib/formats/archive';
import { formatProblem } from '@/lib/kernel/problem';

type Entries = readonly (readonly [name: string, content: string, more?: object])[];

async function pack(entries: Entries): Promise<Uint8Array> {
  const zip = new ZipWriter(new Uint8ArrayWriter(), { useWebWorkers: false });
  for (const [name, content, more] of entries) await zip.add(name, new TextReader(content), more);
  return zip.close();
}

const open = (bytes: Uint8Array, limits: ArchiveLimits = archiveLimits) => openArchive(new Uint8ArrayReader(bytes as Uint8Array<ArrayBuffer>), 'claim.zip', limits);

async function refusals(bytes: Uint8Array, limits?: ArchiveLimits): Promise<string[]> {
  const archive = await open(bytes, limits);
  return archive.ok ? [] : archive.error.map(formatProblem);
}

async function textOf(parts: AsyncIterable<Uint8Array>): Promise<string> {
  let text = '';
  for await (const part of parts) text += new TextDecoder().decode(part);
  return text;
}

/** Writes over every copy of a name in the archive's bytes, keeping its length: names a packer would not write. */
function renamed(bytes: Uint8Array, from: string, to: string): Uint8Array {
  const text = Buffer.from(bytes).toString('latin1').replaceAll(from, to);
  return new Uint8Array(Buffer.from(text, 'latin1'));
}

describe('a claim folder packed as one archive', () => {
  it.each([['at its top', ''], ['in the folder that was packed', 'my-claim/']])('is opened with claim.json %s', async (_, prefix) => {
    const archive = await open(await pack([[`${prefix}claim.json`, '{"format":1}'], [`${prefix}data/a.txt`, '0 1 2\n'.repeat(1000)]]));
    if (!archive.ok) throw new Error(archive.error.map(formatProblem).join('\n'));
    expect(new TextDecoder().decode(archive.value.sheetJson)).toBe('{"format":1}');
    expect(archive.value.names).toEqual(['claim.json', 'data/a.txt']);
    expect(await textOf(archive.value.openFile('data/a.txt'))).toBe('0 1 2\n'.repeat(1000));
    await archive.value.close();
  });

  it('gives a file as often as it is asked for, and stops when the reader stops', async () => {
    const archive = await open(await pack([['claim.json', '{}'], ['a.txt', 'x'.repeat(300_000)]]));
    if (!archive.ok) throw new Error('refused');
    for await (const part of archive.value.openFile('a.txt')) {
      expect(part.length).toBeGreaterThan(0);
      break;
    }
    expect((await textOf(archive.value.openFile('a.txt'))).length).toBe(300_000);
  });

  it('does not give a file it does not hold', async () => {
    const archive = await open(await pack([['claim.json', '{}']]));
    if (!archive.ok) throw new Error('refused');
    await expect(textOf(archive.value.openFile('b.txt'))).rejects.toThrow('no file of this name in the archive');
  });
});

describe('a hostile archive is refused before anything is unpacked', () => {
  it.each([
    ['xx/a.txt', '../a.txt', 'which climbs out of the folder'],
    ['xetc/pass', '/etc/pass', 'the absolute path "/etc/pass"'],
    ['dxa.txt', 'd\\a.txt', 'with a backslash'],
    ['b.txt', 'A.txt', 'twice, or twice but for letter case'],
  ])('for the name %s written as %j', async (before, after, sentence) => {
    const bytes = renamed(await pack([['claim.json', '{}'], ['a.txt', '1'], ...(before === 'a.txt' ? [] : [[before, '2'] as const])]), before, after);
    expect((await refusals(bytes)).join('\n')).toContain(sentence);
  });

  it('for a link', async () => {
    const bytes = await pack([['claim.json', '{}'], ['a.txt', '/etc/passwd', { externalFileAttributes: (0xa1ff << 16) >>> 0, versionMadeBy: 0x0314 }]]);
    expect(await refusals(bytes)).toEqual(['claim.zip: saw "a.txt", a link; expected files and folders only.']);
  });

  it('for a password', async () => {
    const bytes = await pack([['claim.json', '{}'], ['a.txt', '1 2 3', { password: 'x', zipCrypto: true }]]);
    expect(await refusals(bytes)).toEqual(['claim.zip: saw "a.txt", which is encrypted; expected an archive without a password.']);
  });

  it('for a bomb', async () => {
    const bytes = await pack([['claim.json', '{}'], ['a.txt', '0'.repeat(8 * 2 ** 20)]]);
    expect(await refusals(bytes)).toEqual([expect.stringMatching(/^claim\.zip: saw "a\.txt", which grows \d+-fold when unpacked; expected at most 200-fold\.$/)]);
  });

  it('for too many entries, too large a file, too large a whole', async () => {
    const bytes = await pack([['claim.json', '{}'], ['a.txt', 'ab'.repeat(2 ** 20)], ['b.txt', 'ba'.repeat(2 ** 20)]]);
    const limits = { ...archiveLimits, ratio: 1e9 };
    expect(await refusals(bytes, { ...limits, entries: 2 })).toEqual(['claim.zip: saw more than 2 entries; expected at most 2.']);
    expect(await refusals(bytes, { ...limits, fileBytes: 2 ** 20 })).toHaveLength(2);
    expect(await refusals(bytes, { ...limits, totalBytes: 3 * 2 ** 20 })).toEqual(['claim.zip: saw 4 MiB when unpacked; expected at most 3 MiB.']);
  });

  it('for a missing sheet', async () => {
    expect(await refusals(await pack([['a.txt', '1']]))).toEqual(['claim.zip: saw no claim.json at the top of the archive; expected claim.json beside its files.']);
    expect(await refusals(await pack([['a/claim.json', '1'], ['b/claim.json', '2']]))).toHaveLength(1);
  });

  it('for bytes that are no archive', async () => {
    expect(await refusals(new Uint8Array(1000))).toEqual(['claim.zip: saw an archive that cannot be read; expected a .zip with claim.json and its files.']);
  });

  it('and a damaged file is told when it is read', async () => {
    const bytes = await pack([['claim.json', '{}'], ['a.txt', 'the quick brown fox', { level: 0 }]]);
    const spoilt = renamed(bytes, 'quick', 'quack');
    const archive = await open(spoilt);
    if (!archive.ok) throw new Error('refused');
    await expect(textOf(archive.value.openFile('a.txt'))).rejects.toThrow('a damaged file in the archive');
  });
});
