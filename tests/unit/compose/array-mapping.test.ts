import { describe, expect, it } from 'vitest';
import { mappingOf, proposals, withMapping } from '@/app/(desk)/compose/[id]/array-mapping';
import type { StructureEntry } from '@/lib/formats/arrays/structure';

const dataset = (path: string, shape: number[], complex = false, more: Partial<StructureEntry> = {}): StructureEntry => ({ path, kind: 'dataset', shape, complex, type: '', attributes: [], refusal: null, ...more });

describe('the mapping screen and the sheet say the same', () => {
  it.each([
    [{ datasets: { '2,2': '/a', '3,3': '/b[0,:]' }, time: '/t', files: 1 }],
    [{ datasets: { plus: '/a' }, time: { start: -16, step: 0.25 } }],
    [{ other: true }],
  ])('%j comes back as it was', (rest) => {
    expect(withMapping(rest, mappingOf(rest))).toEqual(rest);
  });
  it('a row that is not settled waits outside the sheet', () => {
    expect(withMapping({}, { rows: [{ stands: '2,2', path: '' }, { stands: ' 3,3 ', path: ' /b ' }], time: '', start: '', step: '0.5' })).toEqual({ datasets: { '3,3': '/b' }, time: { start: 0, step: 0.5 } });
  });
  it('a step that is no number is kept, so that the check can say what it saw', () => {
    expect(withMapping({}, { rows: [], time: '', start: '1', step: 'dt' })).toEqual({ time: { start: 1, step: 'dt' } });
  });
});

describe('names propose a mapping', () => {
  it('of the group with most modes first, and the times nearest to it', () => {
    const found = proposals([dataset('/t', [40]), dataset('/R1/l2_m2', [40, 3]), dataset('/R2/l2_m2', [40, 2]), dataset('/R2/l2_m-2', [40, 2]), dataset('/R2/t', [40]), dataset('/R2/notes', [3])]);
    expect(found.map(({ words }) => words)).toEqual(['2 modes of /R2, times in /R2/t', '1 mode of /R1']);
    expect(found[0]?.mapping).toEqual({ rows: [{ stands: '2,2', path: '/R2/l2_m2' }, { stands: '2,-2', path: '/R2/l2_m-2' }], time: '/R2/t', start: '', step: '' });
  });
  it('by attributes l and m where the name says nothing', () => {
    expect(proposals([dataset('/run/first', [9], true, { attributes: [{ name: 'l', value: '4' }, { name: 'm', value: '-4' }] })])[0]?.mapping.rows).toEqual([{ stands: '4,-4', path: '/run/first' }]);
  });
  it('of one array for all modes, with its list', () => {
    expect(proposals([dataset('t', [40]), dataset('modes', [3, 2]), dataset('data', [3, 40], true)])[0]).toEqual({ words: 'all modes in data, listed in modes, times in t', mapping: { rows: [{ stands: 'data', path: 'data' }, { stands: 'modes', path: 'modes' }], time: 't', start: '', step: '' } });
  });
  it('never of what cannot be used, nor where names say nothing', () => {
    expect(proposals([dataset('/l2_m2', [40, 3], false, { refusal: 'saw text' }), dataset('/x', [40, 3]), dataset('/y', [4, 4])])).toEqual([]);
  });
});
