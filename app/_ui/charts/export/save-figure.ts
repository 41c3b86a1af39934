import { figureSvg, type SvgRequest } from './figure-svg';
import { fileNameOf } from './figure-words';

export type SavedAs = 'svg' | 'png' | 'csv';

/** Two dots of the picture to one of the page: sharp in print at column width. */
const PNG_SCALE = 2;

async function pngOf(request: SvgRequest): Promise<Blob> {
  const { svg, width, height } = figureSvg(request);
  const address = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = address;
    await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = width * PNG_SCALE;
    canvas.height = height * PNG_SCALE;
    const pen = canvas.getContext('2d');
    if (!pen) throw new Error('no canvas to draw on');
    pen.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await new Promise((resolve, reject) => canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('the canvas gave no picture'))), 'image/png'));
  } finally {
    URL.revokeObjectURL(address);
  }
}

async function blobOf(as: SavedAs, request: SvgRequest): Promise<Blob> {
  if (as === 'png') return pngOf(request);
  if (as === 'svg') return new Blob([figureSvg(request).svg], { type: 'image/svg+xml' });
  // Tables are written by a library that only those load who save one.
  const { figureCsv } = await import('./figure-csv');
  return new Blob([figureCsv(request.figure, request.origin)], { type: 'text/csv;charset=utf-8' });
}

/** Hands the file to the browser's own downloads. */
export async function saveFigure(as: SavedAs, request: SvgRequest): Promise<void> {
  const address = URL.createObjectURL(await blobOf(as, request));
  const link = document.createElement('a');
  link.href = address;
  link.download = fileNameOf(request.figure, request.origin, as);
  link.click();
  // The download has begun when the click returns, but some browsers read the address a moment later.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
