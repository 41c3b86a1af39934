import { describe, expect, it } from 'vitest';
import { TableParser } from '@/lib/formats/text/table-parser';

function commentsOf(text: string, chunk = text.length) {
  const bytes = new TextEncoder().encode(text);
  const parser = new TableParser('a.txt', ['t', 're']);
  for (let i = 0; i < bytes.length; i += chunk) parser.push(bytes.subarray(i, i + chunk));
  const table = parser.finish();
  if (!table.ok) throw new Error(JSON.stringify(table.error));
  return table.value.comments;
}

describe('what a file says about itself is kept', () => {
  it('with the line on which each comment stands, however the bytes arrive', () => {
    const text = '# Gridlark, run 7\n#\n! mass1 = 0.5\n0 1\n1 2\n  % end\n';
    const expected = [{ line: 1, text: 'Gridlark, run 7' }, { line: 3, text: 'mass1 = 0.5' }, { line: 6, text: 'end' }];
    expect(commentsOf(text)).toEqual(expected);
    expect(commentsOf(text, 5)).toEqual(expected);
  });

  it('up to two hundred lines of five hundred bytes', () => {
    const comments = commentsOf(`${`# ${'x'.repeat(2000)}\n`.repeat(300)}0 1\n1 2\n`) ?? [];
    expect(comments).toHaveLength(200);
    expect(comments[0]?.text.length).toBeLessThan(501);
  });
});
