/**
 * Writes content/specimens again from the closed-form generator: `node --import tsx lib/tools/make-specimens.ts`.
 * A test compares what stands there with what this would write.
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { specimens } from './specimens';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..', 'content', 'specimens');
for (const { folder, files } of specimens) {
  mkdirSync(join(root, folder), { recursive: true });
  for (const { path, text } of files()) {
    writeFileSync(join(root, folder, path), text);
    console.log(`${folder}/${path}  ${(text.length / 1024).toFixed(0)} kB`);
  }
}
