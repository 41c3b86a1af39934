import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { noMapping } from '@/app/(desk)/compose/[id]/array-mapping';
import { Assign } from '@/app/(desk)/compose/[id]/array-part';
import type { StructureView } from '@/lib/services/files/structure-schema';

const entry = { kind: 'dataset' as const, complex: false, type: 'real numbers of 8 bytes', attributes: [{ name: 'l', value: '2' }], refusal: null };
const structure: StructureView = { format: 'hdf5', cut: true, trouble: [], entries: [{ ...entry, path: '/l2_m2', shape: [40, 3] }, { ...entry, path: '/t', shape: [1200] }, { ...entry, path: '/out', shape: null, refusal: 'saw a link to another file' }] };
const drawn = (mapping = noMapping): string => renderToStaticMarkup(<Assign structure={structure} file="a.h5" mapping={mapping} change={() => undefined} />);

describe('the mapping screen', () => {
  it('lists shape, type and attributes in a table with a name, and the reason in place of a button', () => {
    const html = drawn();
    expect(html).toContain('aria-label="Datasets of a.h5"');
    expect(html).toContain('40 × 3');
    expect(html).toContain('1,200');
    expect(html).toContain('l: 2');
    expect(html).toContain('aria-label="Use /l2_m2"');
    expect(html).toContain('aria-label="Take /t as times"');
    expect(html).toContain('saw a link to another file');
    expect(html).not.toContain('aria-label="Use /out"');
    expect(html).toContain('More is in the file than is listed.');
  });
  it('offers what the names say, until something is mapped', () => {
    expect(drawn()).toContain('Use 1 mode');
    const mapped = drawn({ ...noMapping, rows: [{ stands: '2,2', path: '/l2_m2' }] });
    expect(mapped).not.toContain('By the names');
    expect(mapped).toContain('value="2,2"');
    expect(mapped).toContain('aria-label="Remove row 1"');
  });
});
