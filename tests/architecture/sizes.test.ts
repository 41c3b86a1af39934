import { describe, expect, it } from 'vitest';
import { functionsOf } from './support/functions';
import { filesIn } from './support/source-files';

const FILE_CAP = 400;
const FUNCTION_CAP = 60;
const COMPONENT_CAP = 120;

const FILES = ['lib', 'db', 'app'].flatMap((folder) => filesIn(folder, ['.ts', '.tsx', '.mjs']));
const linesOf = (text: string): number => text.trimEnd().split('\n').length;
const median = (numbers: readonly number[]): number => numbers.toSorted((a, b) => a - b)[Math.floor(numbers.length / 2)] ?? 0;

describe('a reader can hold a file, and a function, in mind', () => {
  it(`no file is longer than ${FILE_CAP} lines`, () => {
    const sizes = FILES.map(({ path, text }) => ({ path, lines: linesOf(text) }));
    console.log(`${sizes.length} files, median ${median(sizes.map(({ lines }) => lines))} lines (aim: 70); longest: ${longest(sizes)}`);
    expect(sizes.filter(({ lines }) => lines > FILE_CAP)).toEqual([]);
  });

  it(`no function is longer than ${FUNCTION_CAP} lines, no component longer than ${COMPONENT_CAP}`, () => {
    const sizes = FILES.flatMap(functionsOf);
    const medianLines = median(sizes.map(({ lines }) => lines));
    console.log(
      `${sizes.length} functions, median ${medianLines} lines (aim: 15); longest: ${longest(sizes.map(({ where, lines }) => ({ path: where, lines })))}`,
    );
    expect(sizes.filter(({ lines, isComponent }) => lines > (isComponent ? COMPONENT_CAP : FUNCTION_CAP))).toEqual([]);
  });
});

function longest(sizes: readonly { readonly path: string; readonly lines: number }[]): string {
  const top = sizes.toSorted((a, b) => b.lines - a.lines).slice(0, 3);
  return top.map(({ path, lines }) => `${path} ${lines}`).join(', ');
}
