import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { FileRefused, type OpenFile } from '@/lib/formats/open-file';
import { reproduce } from '@/lib/pipeline/reproduce';
import { readHdf5 } from '@/lib/threads/read-hdf5';
import { searchLimit } from '@/lib/threads/search-limit';
import { beginSearch, endedByHand, stepAside, type SheetTask, type ThreadNote } from './sheet-task';

/**
 * Runs inside a worker thread: one sheet through the whole pipeline. It is given paths, never an
 * environment, a database or a store. Cancelling ends the thread from outside; a search is ended from
 * within, so that the numbers found before it are kept. Standing aside for more urgent runs is no time of this one's.
 */
export default async function sheetThread({ sheet, files, withFigures, explain, otherwise, port, wishes }: SheetTask): ReturnType<typeof reproduce> {
  let asideMs = 0;
  const giveWay = (): void => void (asideMs += stepAside(wishes, () => performance.now()));
  const say = (note: ThreadNote): void => port.postMessage(note);
  const tell = onlyNews((fraction, doing) => say({ fraction, doing }));
  const limit = searchLimit(undefined, () => performance.now() - asideMs);
  const endedBy = (): string | null => {
    if (beginSearch(wishes)) say('searching');
    giveWay();
    return endedByHand(wishes) ?? limit.endedBy();
  };
  try {
    return await reproduce(
      { sheetJson: sheet, openFile: openAmong(files), readHdf5 },
      { withFigures, onProgress: (fraction, doing) => (giveWay(), tell(fraction, doing)), cancelled: () => (giveWay(), false), digest: sha256, ...(otherwise && { otherwise }), ...(explain ? { explain: { endedBy } } : {}) },
    );
  } finally {
    port.close();
  }
}

/** Only files that were handed over: a sheet that names another learns nothing about this machine. */
function openAmong(files: SheetTask['files']): OpenFile {
  const paths = new Map(files.map(({ name, path }) => [name, path]));
  return (name) => {
    const path = paths.get(name);
    if (path === undefined)
      throw new FileRefused('no file of this name', 'the file among those attached', 'Attach the file, or correct its name in the sheet.');
    return createReadStream(path, { highWaterMark: 2 ** 20 });
  };
}

function sha256(): { update: (bytes: Uint8Array) => void; hex: () => string } {
  const hash = createHash('sha256');
  return { update: (bytes) => void hash.update(bytes), hex: () => hash.digest('hex') };
}

/** A message costs more than an inner product: tell per cents and new activities, not every point. */
function onlyNews(note: (fraction: number, doing: string) => void): (fraction: number, doing: string) => void {
  let told = -1;
  let toldDoing = '';
  return (fraction, doing) => {
    const percent = Math.floor(100 * fraction);
    if (percent === told && doing === toldDoing) return;
    told = percent;
    toldDoing = doing;
    note(fraction, doing);
  };
}
