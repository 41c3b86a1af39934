import { constants } from 'node:fs';
import { open, readFile, realpath, stat } from 'node:fs/promises';
import path from 'node:path';
import { Reader } from '@zip.js/zip.js';
import { openArchive } from '@/lib/formats/archive';
import { FileRefused, type OpenFile } from '@/lib/formats/open-file';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';

/** A claim folder, its sheet file, or the folder as one `.zip`, on this machine's disk. */
export interface OpenedSource {
  readonly sheetJson: Uint8Array;
  readonly openFile: OpenFile;
  readonly close: () => Promise<void>;
}

const chunkBytes = 2 ** 20;

export async function openSource(given: string): Promise<Result<OpenedSource, Problem[]>> {
  const kind = await stat(given).catch(() => null);
  if (kind === null) return refuse(given, 'nothing at this path');
  if (kind.isDirectory()) return openFolder(given, 'claim.json');
  if (!kind.isFile()) return refuse(given, 'neither a file nor a folder');
  return given.toLowerCase().endsWith('.zip') ? openZip(given) : openFolder(path.dirname(given), path.basename(given));
}

const refuse = (where: string, saw: string): Result<never, Problem[]> => err([{ code: 'tools/no-sheet', where, saw, expected: 'a folder with claim.json, a claim.json, or a .zip of such a folder' }]);

async function openFolder(folder: string, sheetName: string): Promise<Result<OpenedSource, Problem[]>> {
  const sheetJson = await readFile(path.join(folder, sheetName)).catch(() => null);
  if (sheetJson === null) return refuse(folder, `no ${sheetName} in the folder`);
  return ok({ sheetJson: new Uint8Array(sheetJson), openFile: (name) => readInside(folder, name), close: async () => undefined });
}

/** A link that leads out of the folder is refused, and so is anything that is not a plain file: a pipe would wait for ever. */
async function* readInside(folder: string, name: string): AsyncGenerator<Uint8Array> {
  const root = await realpath(folder);
  const target = await realpath(path.join(root, name));
  if (target !== root && !target.startsWith(root + path.sep)) throw new FileRefused('a link that leads out of the folder', 'a file inside the claim’s folder');
  const handle = await open(target, constants.O_RDONLY | constants.O_NONBLOCK);
  try {
    if (!(await handle.stat()).isFile()) throw new FileRefused('something that is not a plain file', 'a file');
    for (;;) {
      const buffer = new Uint8Array(chunkBytes);
      const { bytesRead } = await handle.read(buffer, 0, chunkBytes);
      if (bytesRead === 0) return;
      yield buffer.subarray(0, bytesRead);
    }
  } finally {
    await handle.close();
  }
}

async function openZip(file: string): Promise<Result<OpenedSource, Problem[]>> {
  const handle = await open(file, 'r');
  const { size } = await handle.stat();
  const archive = await openArchive(new HandleReader(handle, size), path.basename(file));
  if (!archive.ok) {
    await handle.close();
    return archive;
  }
  const close = async () => {
    await archive.value.close();
    await handle.close();
  };
  return ok({ sheetJson: archive.value.sheetJson, openFile: archive.value.openFile, close });
}

type Handle = Awaited<ReturnType<typeof open>>;

/** Random access to a file, so that an archive is not read into memory as a whole. */
class HandleReader extends Reader<Handle> {
  constructor(
    private readonly handle: Handle,
    override readonly size: number,
  ) {
    super(handle);
  }

  override async readUint8Array(index: number, length: number): Promise<Uint8Array<ArrayBuffer>> {
    const buffer = new Uint8Array(Math.min(length, Math.max(0, this.size - index)));
    let read = 0;
    while (read < buffer.length) {
      const { bytesRead } = await this.handle.read(buffer, read, buffer.length - read, index + read);
      if (bytesRead === 0) break;
      read += bytesRead;
    }
    return buffer.subarray(0, read);
  }
}
