import fc from 'fast-check';
import { expect, it } from 'vitest';
import { BLANKED, withIdentityBlanked } from '@/lib/formats/blank-identity';
import { identityIn } from '@/lib/formats/hidden-identity';

const encoder = new TextEncoder();
async function blanked(text: string | Uint8Array, ...cuts: number[]): Promise<string> {
  const bytes = typeof text === 'string' ? encoder.encode(text) : text;
  const edges = [0, ...cuts.map((cut) => Math.min(cut, bytes.length)).sort((a, b) => a - b), bytes.length];
  const source = async function* () {
    for (let i = 1; i < edges.length; i++) yield bytes.subarray(edges[i - 1], edges[i]);
  };
  const out: Uint8Array[] = [];
  for await (const part of withIdentityBlanked(source())) out.push(part);
  return Buffer.concat(out).toString('latin1');
}
const padded = (comment: string): string => ` ${BLANKED}`.padEnd(comment.length);

it('comments that say whose a file is are blanked to their length, the others and all numbers stay', async () => {
  const whose = [' contact: Ada Nobody <ada@example.org>', ' from /home/rosalind/runs/q1/h22.dat, thinned by 4'];
  const text = `# Ninefold, run 12\r\n#${whose[0]}\r\n1 2 3\r\n  %${whose[1]}\n4 5 6 ! uid: ada\n7 8 9`;
  expect(await blanked(text)).toBe(`# Ninefold, run 12\r\n#${padded(whose[0]!)}\r\n1 2 3\r\n  %${padded(whose[1]!)}\n4 5 6 !${'x'.repeat(9)}\n7 8 9`);
});

it('a name in an encoding of its own keeps its bytes in number', async () => {
  const text = Buffer.from('# Author: Jörg Nobody, of nowhere in particular\n1 2\n', 'latin1');
  const copy = await blanked(text);
  expect([copy.length, copy.endsWith('\n1 2\n'), copy.includes('Nobody')]).toEqual([text.length, true, false]);
});

it('wherever a file is cut into pieces, its copy is the same, as long, with as many lines, and says nothing', async () => {
  const line = fc.constantFrom('# from /home/ada/runs', '#%! plain', '1.5e-3 2', '', '% user=ada', '3 4 # ada@example.org', `# ${'long '.repeat(150)}login: ada`);
  await fc.assert(
    fc.asyncProperty(fc.array(line, { maxLength: 8 }), fc.array(fc.nat(900), { maxLength: 5 }), async (lines, cuts) => {
      const text = lines.join('\n');
      const whole = await blanked(text);
      expect(await blanked(text, ...cuts)).toBe(whole);
      expect([whole.length, whole.split('\n').length]).toEqual([text.length, text.split('\n').length]);
      expect(whole.split('\n').filter((kept) => identityIn(kept) !== null)).toEqual([]);
      const numbers = (of: string): string[] => of.split('\n').filter((kept) => !/[#%!]/.test(kept));
      expect(numbers(whole)).toEqual(numbers(text));
    }),
    { numRuns: 60, seed: 29 },
  );
});
