import { ready } from 'h5wasm';

export type H5Module = Awaited<typeof ready>;

/** Bytes of the one file there is, by position. */
export interface RandomAccess {
  readonly size: number;
  readonly read: (into: Uint8Array, at: number) => number;
}

/** The library with one file in its virtual file system, and nothing else to be reached. */
export interface OneFile {
  readonly h5: H5Module;
  readonly id: bigint;
  /** Paths that the file's own links or storage asked for; each was refused. */
  readonly reachedFor: readonly string[];
}

/** Rejects where the library itself cannot be loaded, which is no fault of a file. */
export async function libraryIsHere(): Promise<void> {
  await ready;
}

const place = '/in/f.h5';
const noSuchFile = 44;
const readOnly = 69;

/** What is used of the library's file system; its own types leave it open. */
interface Files {
  mkdir(path: string): void;
  createFile(parent: string, name: string, properties: object, canRead: boolean, canWrite: boolean): FileNode;
  open(path: string, ...rest: unknown[]): unknown;
  readonly ErrnoError: new (errno: number) => Error;
}
interface FileNode {
  node_ops: { getattr: (node: unknown) => object };
  stream_ops: object;
}

/**
 * Opens an uploaded file. The library is the build for browsers: its file system is memory, so links
 * inside the file cannot reach this machine. Beyond that every path but the file's own is refused,
 * devices included, and after the file is open that path too: storage in "another" file may name it.
 */
export async function openOneFile(bytes: RandomAccess): Promise<OneFile> {
  const h5 = await ready;
  h5.activate_throwing_error_handler();
  const files = h5.FS as unknown as Files;
  files.mkdir('/in');
  serve(files, files.createFile('/in', 'f.h5', {}, true, false), bytes);
  const reachedFor: string[] = [];
  let opened = false;
  const open = files.open.bind(files);
  files.open = (path, ...rest) => {
    const own = path === place && !opened;
    // The library prints its errors through a temporary file.
    if (own || /^\/tmp\/tmpfile_\w+$/.test(path)) return open(path, ...rest);
    reachedFor.push(path);
    throw new files.ErrnoError(noSuchFile);
  };
  const id = h5.open(place, h5.H5F_ACC_RDONLY, false, -1, -1);
  opened = true;
  return { h5, id, reachedFor };
}

interface Stream {
  readonly position: number;
}

/** Reads go straight to the given bytes: no copy of the file is held. */
function serve(files: Files, node: FileNode, { size, read }: RandomAccess): void {
  const { getattr } = node.node_ops;
  const refuse = (): never => {
    throw new files.ErrnoError(readOnly);
  };
  node.node_ops = { ...node.node_ops, getattr: (n: unknown) => ({ ...getattr(n), size }), ...{ setattr: refuse } };
  node.stream_ops = {
    ...node.stream_ops,
    read: (_stream: Stream, buffer: Uint8Array, offset: number, length: number, at: number) =>
      at >= size ? 0 : read(buffer.subarray(offset, offset + Math.min(length, size - at)), at),
    write: refuse,
    mmap: undefined,
    llseek: (stream: Stream, offset: number, whence: number) => {
      const at = offset + (whence === 1 ? stream.position : whence === 2 ? size : 0);
      if (at < 0) throw new files.ErrnoError(28);
      return at;
    },
  };
}

const pageBytes = 2 ** 16;

/** For this thread: a library that asks for more gets none, and says so as an error of its own. */
export function capMemory(bytes: number): void {
  const memory = WebAssembly.Memory.prototype;
  const grow = memory.grow;
  memory.grow = function (this: WebAssembly.Memory, pages: number) {
    if (this.buffer.byteLength + pages * pageBytes > bytes) throw new RangeError('more memory than this thread may have');
    return grow.call(this, pages);
  };
}
