import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import type { ResultClaim } from '@/lib/pipeline/result';
import { runFolder } from './run-folder';

/**
 * Required: independent derivation — sheets with expected figures from closed forms and one numpy reading of the definitions; they lie outside the project. Its methods: cubic splines in time, one
 * padded transform of at least 2²⁰ points, trapezoids with linear parts of cells at the band's edges, noise along straight lines in the logarithms, Brent's and bounded
 * minimisation for roots and maxima.
 */
const sheets = join('..', 'shared', 'reference', 'sheets');

interface Figure {
  readonly value: number;
  readonly tolerance: number;
  readonly kind: 'rel' | 'abs';
}
interface Expected {
  readonly points: readonly Figure[];
  readonly components?: Readonly<Record<string, Figure>>;
}
const within = ({ tolerance, kind }: Figure) => (kind === 'rel' ? { relative: tolerance } : tolerance);

const names = existsSync(sheets) ? readdirSync(sheets).sort() : ['(none: the sheets are missing)'];

describe.each(names)('the reference sheet %s', (name) => {
  const folder = join(sheets, name);
  const present = existsSync(join(folder, 'expected.json'));
  const expected = present
    ? (JSON.parse(readFileSync(join(folder, 'expected.json'), 'utf8')) as { claims: Record<string, Expected> }).claims
    : {};
  let claims: ReadonlyMap<string, ResultClaim> = new Map();

  it.runIf(present)(`needs ${folder}, which lies outside the project`, () => expect(Object.keys(expected).length).toBeGreaterThan(0));

  describe.runIf(present)('figure by figure', () => {
    beforeAll(async () => void (claims = await runFolder(folder)), 300_000);
    it.each(Object.entries(expected))('gives %s as expected, and agrees', (id, { points, components }) => {
      const claim = claims.get(id);
      points.forEach((figure, i) => expect(claim?.points[i]?.value).toAgreeWith(figure.value, within(figure)));
      for (const [component, figure] of Object.entries(components ?? {})) expect(claim?.points[0]?.components?.[component], component).toAgreeWith(figure.value, within(figure));
      expect(claim?.verdict).toBe('agrees');
    });
  });
});
